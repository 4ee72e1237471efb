import type * as ToneJs from 'tone';
import type { PlayList, PlayedTone } from './play-list';

/** Plays one list at a time. Nothing sounds, and no audio is set up, before `play` is called. */
export interface Player {
  /** Ends what sounds and begins this; resolves when it has begun. `onEnd` is not called when it is stopped. */
  play(list: PlayList, options: PlayOptions): Promise<void>;
  stop(): void;
}

export interface PlayOptions {
  /** Quarter notes per minute. This and the next two are asked anew all the time: they can be changed while it plays. */
  tempo(): number;
  loops(): boolean;
  hears(tone: PlayedTone): boolean;
  /** Told the tick now sounding, each once. */
  onMoment(tick: number): void;
  onEnd(): void;
}

/** How far ahead tones are handed to the sound; a hidden page's timers may take a second. */
const AHEAD_S = 0.2;
const AHEAD_HIDDEN_S = 1.5;
const TURN_MS = 60;
/** The device needs this to begin without a stumble. */
const LEAD_S = 0.12;
const FADE_S = 0.06;

type Tone = typeof ToneJs;

/** Synthesised in the browser by Tone.js, fetched with the first press of play; no samples. */
export function createPlayer(): Player {
  let end: (() => void) | null = null;
  let turn = 0;
  const stop = () => {
    turn += 1;
    end?.();
    end = null;
  };
  return {
    stop,
    async play(list, options) {
      stop();
      const mine = turn;
      const tone = await import('tone');
      await tone.start();
      // Stopped, or another begun, while the library was on its way.
      if (mine === turn) end = begin(tone, list, options);
    },
  };
}

/** Begins to play; what it gives ends it. */
function begin(tone: Tone, list: PlayList, { tempo, loops, hears, onMoment, onEnd }: PlayOptions): () => void {
  const voices = openVoices(tone);
  // The moment at which the beginning sounds or would have sounded, at the present tempo.
  let origin = tone.immediate() + LEAD_S;
  let pace = 60 / tempo();
  let next = 0;
  let moment = 0;
  const keepPace = (now: number) => {
    const wanted = 60 / tempo();
    if (wanted === pace) return;
    origin = now - ((now - origin) / pace) * wanted;
    pace = wanted;
  };
  const turn = () => {
    const now = tone.immediate();
    keepPace(now);
    const at = (now - origin) / pace;
    const passed = list.moments.findLastIndex((m) => m.at <= at);
    if (passed >= moment) onMoment((list.moments[passed] as { tick: number }).tick);
    moment = Math.max(moment, passed + 1);
    const ahead = at + (document.hidden ? AHEAD_HIDDEN_S : AHEAD_S) / pace;
    for (let struck = list.tones[next]; struck && struck.at <= ahead; struck = list.tones[next]) {
      next += 1;
      if (hears(struck)) voices.strike(struck.midi, struck.length * pace, origin + struck.at * pace, struck.loudness);
    }
    if (at < list.length) return;
    if (!loops()) {
      close();
      return onEnd();
    }
    origin += list.length * pace;
    next = 0;
    moment = 0;
  };
  const timer = setInterval(turn, TURN_MS);
  const close = () => {
    clearInterval(timer);
    voices.close();
  };
  turn();
  return close;
}

/** Soft enough for chords of many notes; a limiter keeps them from distorting. */
function openVoices(tone: Tone) {
  const limiter = new tone.Limiter(-3).toDestination();
  const volume = new tone.Volume(-14).connect(limiter);
  const synth = new tone.PolySynth(tone.Synth, {
    oscillator: { type: 'fatcustom', partials: [1, 0.45, 0.22, 0.1, 0.05], spread: 6, count: 2 },
    envelope: { attack: 0.012, decay: 0.9, sustain: 0.35, release: 0.35 },
  }).connect(volume);
  synth.maxPolyphony = 64;
  return {
    strike: (midi: number, length: number, at: number, loudness: number) => {
      synth.triggerAttackRelease(440 * 2 ** ((midi - 69) / 12), length, at, loudness);
    },
    close: () => {
      volume.volume.rampTo(-60, FADE_S);
      setTimeout(() => {
        synth.dispose();
        volume.dispose();
        limiter.dispose();
      }, FADE_S * 1000 + 40);
    },
  };
}
