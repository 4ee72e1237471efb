import type { Page } from '@playwright/test';

interface Heard {
  contexts: number;
  /** Loudest sample since it was last asked, 0–1. */
  peak(): number;
}

/** Must be called before the page is opened: from then on it is known what the page sends to the loudspeaker. */
export async function listenTo(page: Page): Promise<void> {
  await page.addInitScript(() => {
    const ears: AnalyserNode[] = [];
    const heard: Heard = {
      contexts: 0,
      peak: () => {
        let peak = 0;
        for (const ear of ears) {
          const samples = new Float32Array(ear.fftSize);
          ear.getFloatTimeDomainData(samples);
          for (const sample of samples) peak = Math.max(peak, Math.abs(sample));
        }
        return peak;
      },
    };
    Object.assign(window, { heard });
    const Native = window.AudioContext;
    window.AudioContext = class extends Native {
      constructor(options?: AudioContextOptions) {
        super(options);
        heard.contexts += 1;
      }
    };
    const connect = AudioNode.prototype.connect as (this: AudioNode, ...to: unknown[]) => unknown;
    AudioNode.prototype.connect = function (this: AudioNode, ...to: unknown[]) {
      if (to[0] instanceof AudioDestinationNode) {
        const ear = new AnalyserNode(this.context, { fftSize: 8192 });
        ears.push(ear);
        connect.call(this, ear);
      }
      return connect.apply(this, to);
    } as typeof AudioNode.prototype.connect;
  });
}

/** Loudest sample of the last moments, 0–1. */
export function loudness(page: Page): Promise<number> {
  return page.evaluate(() => (window as unknown as { heard: Heard }).heard.peak());
}

/** How often the page has set up audio. */
export function audioContexts(page: Page): Promise<number> {
  return page.evaluate(() => (window as unknown as { heard: Heard }).heard.contexts);
}
