import type { PlayOrderSign, Score } from './score';

/**
 * The bars in the order they are played, as indices into `Score.bars`: repeats, endings, da capo, dal segno, coda and
 * fine played out. Common practice, no source: without a start sign a repeat goes back to behind the last one; after a
 * da capo or dal segno repeats are not taken again and the last ending is played. Signs that lead nowhere are passed over.
 */
export function performedBars(score: Pick<Score, 'bars' | 'playOrder'>): number[] {
  return new Performance(score.bars.length, score.playOrder).play();
}

interface OpenRepeat {
  readonly start: number;
  pass: number;
}

interface Ending {
  readonly first: number;
  readonly last: number;
  readonly passes: readonly number[];
  /** Highest pass of the endings that stand side by side with this one. */
  readonly lastPass: number;
}

/** No performance is longer: faulty signs could send it round for ever. */
const MAX_PLAYED = 100_000;

class Performance {
  private readonly played: number[] = [];
  private readonly endings: readonly Ending[];
  private readonly repeats: OpenRepeat[] = [];
  private behindLastRepeat = 0;
  /** Set by a da capo or dal segno, which is followed once. */
  private returned = false;

  constructor(
    private readonly barCount: number,
    private readonly signs: readonly PlayOrderSign[],
  ) {
    this.endings = findEndings(signs, barCount);
  }

  play(): number[] {
    let bar = 0;
    while (bar < this.barCount && this.played.length < MAX_PLAYED) {
      const skipped = this.enter(bar);
      if (skipped !== undefined) {
        bar = skipped;
        continue;
      }
      this.played.push(bar);
      bar = this.leave(bar);
    }
    return this.played;
  }

  private find(kind: PlayOrderSign['kind'], bar: number): PlayOrderSign | undefined {
    return this.signs.find((sign) => sign.kind === kind && sign.bar === bar);
  }

  /** Opens a repeat that starts here; gives the bar to go on with when an ending here is not for this pass. */
  private enter(bar: number): number | undefined {
    if (this.repeats[this.repeats.length - 1]?.start === bar) return undefined;
    const ending = this.endings.find(({ first }) => first === bar);
    if (ending && ending.passes.length > 0) {
      if (!ending.passes.includes(this.currentPass(ending))) return ending.last + 1;
      if (ending.passes.includes(ending.lastPass) && !this.repeatsWithin(ending)) this.closeRepeat(ending.last);
    }
    if (this.find('repeat-start', bar)) this.repeats.push({ start: bar, pass: 1 });
    return undefined;
  }

  private currentPass(ending: Ending): number {
    return this.returned ? ending.lastPass : (this.repeats[this.repeats.length - 1]?.pass ?? this.passWithoutStart());
  }

  private repeatsWithin({ first, last }: Ending): boolean {
    return this.signs.some(({ kind, bar }) => kind === 'repeat-end' && bar >= first && bar <= last);
  }

  private passWithoutStart(): number {
    this.repeats.push({ start: this.behindLastRepeat, pass: 1 });
    return 1;
  }

  /** The bar to play after this one. */
  private leave(bar: number): number {
    const ending = this.endings.find(({ first, last }) => first <= bar && bar <= last);
    const back = this.find('repeat-end', bar);
    if (back && !this.returned) return this.leaveRepeat(bar, ending ? Math.max(ending.lastPass, 2) : back.times);
    return this.jump(bar);
  }

  private leaveRepeat(bar: number, passes: number): number {
    const open = this.repeats[this.repeats.length - 1] ?? { start: this.behindLastRepeat, pass: 1 };
    if (this.repeats.length === 0) this.repeats.push(open);
    if (open.pass < passes) {
      open.pass += 1;
      return open.start;
    }
    this.closeRepeat(bar);
    return this.jump(bar);
  }

  private closeRepeat(bar: number): void {
    this.repeats.pop();
    this.behindLastRepeat = bar + 1;
  }

  private jump(bar: number): number {
    if (this.returned) {
      if (this.find('fine', bar)) return this.barCount;
      const coda = this.find('to-coda', bar) && this.signs.find(({ kind, bar: at }) => kind === 'coda' && at > bar);
      return coda ? coda.bar : bar + 1;
    }
    const segno = this.find('dal-segno', bar) && this.signs.find(({ kind }) => kind === 'segno');
    if (!segno && !this.find('da-capo', bar)) return bar + 1;
    this.returned = true;
    this.repeats.length = 0;
    return segno ? segno.bar + (segno.at === 'end' ? 1 : 0) : 0;
  }
}

function findEndings(signs: readonly PlayOrderSign[], barCount: number): Ending[] {
  const starts = signs.filter(({ kind }) => kind === 'ending-start').sort((a, b) => a.bar - b.bar);
  const spans = starts.map(({ bar, passes }, i) => {
    const before = starts[i + 1]?.bar ?? barCount;
    const end = signs.find((sign) => sign.kind === 'ending-end' && sign.bar >= bar && sign.bar < before);
    return { first: bar, last: end?.bar ?? bar, passes };
  });
  return spans.map((span) => ({ ...span, lastPass: lastPassBeside(spans, span.first) }));
}

/** Endings that follow one another without a bar between them belong together. */
function lastPassBeside(spans: readonly Omit<Ending, 'lastPass'>[], first: number): number {
  const at = spans.findIndex((span) => span.first === first);
  let [from, to] = [at, at];
  while (from > 0 && (spans[from - 1] as Ending).last + 1 === (spans[from] as Ending).first) from -= 1;
  while (to + 1 < spans.length && (spans[to] as Ending).last + 1 === (spans[to + 1] as Ending).first) to += 1;
  return Math.max(1, ...spans.slice(from, to + 1).flatMap(({ passes }) => passes));
}
