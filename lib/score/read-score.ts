import type { Result } from '../result';
import { Draft } from './draft';
import { finishScore } from './finish-score';
import { DEFAULT_LIMITS, type ScoreLimits } from './limits';
import { catchRefusal, openFile } from './open-score-file';
import { type MeasureWatcher, type PartState, readMeasure } from './read-measure';
import { refuse } from './refusal';
import type { Score, ScoreError } from './score';
import { type XmlElement, type XmlFrame, type XmlSink, findChild, findText, streamXml } from './xml';

/**
 * Bytes of a `.musicxml`, `.xml` or `.mxl` file → Score, or why it is refused and where. Never throws on input; bounded
 * in memory by `limits` and in time by the length of the text. Runs in the browser and in Node.
 */
export function readScore(bytes: Uint8Array, limits: ScoreLimits = DEFAULT_LIMITS): Result<Score, ScoreError> {
  return catchRefusal(() => readText(openFile(bytes, limits).xml, limits));
}

/** The same for XML text. */
export function readScoreText(xml: string, limits: ScoreLimits = DEFAULT_LIMITS): Result<Score, ScoreError> {
  return catchRefusal(() => readText(xml, limits));
}

/** Throws Refusals; for the readers and writers of lib/score. `watch` sees every element of every bar with its place. */
export function readText(xml: string, limits: ScoreLimits, watch?: MeasureWatcher, skip: ReadonlySet<string> = NOT_READ): Score {
  const reader = new ScoreReader(skip, watch);
  streamXml(xml, reader, limits);
  return finishScore(reader.draft, reader.finish());
}

/** Elements that say nothing about what sounds, when, or how the file is called: most of a file. */
const NOT_READ: ReadonlySet<string> = new Set([
  'accidental', 'appearance', 'beam', 'clef', 'defaults-layout', 'dot', 'figured-bass', 'harmony', 'instrument', 'listen',
  'lyric', 'lyric-font', 'measure-style', 'metronome', 'midi-device', 'midi-instrument', 'music-font', 'notehead',
  'notehead-text', 'page-layout', 'part-group', 'play', 'print', 'scaling', 'score-instrument', 'slur', 'staff-details',
  'staff-layout', 'stem', 'supports', 'system-layout', 'technical', 'time-modification', 'type', 'word-font',
]);

/** What the head of a file says. */
export interface ScoreHead {
  work: string;
  movement: string;
  composer: string;
  readonly credits: XmlElement[];
  /** By id, in the order of the part list. */
  readonly partNames: Map<string, string>;
  readonly parts: PartState[];
}

class ScoreReader implements XmlSink {
  readonly draft = new Draft();
  private readonly head: ScoreHead = { work: '', movement: '', composer: '', credits: [], partNames: new Map(), parts: [] };
  private root = '';
  private atConcertPitch = false;
  private readonly parts = new Map<string, PartState>();
  private measures = 0;

  constructor(
    readonly skip: ReadonlySet<string>,
    private readonly watch: MeasureWatcher | undefined,
  ) {}

  gather(element: XmlFrame, ancestors: readonly XmlFrame[]): 'whole' | 'enter' {
    const { name, line } = element;
    if (ancestors.length === 0) this.enterRoot(name, line);
    if (ancestors.length === 1 && name === 'part' && this.root === 'score-partwise') this.enterPart(element);
    if (ancestors.length === 1 && name === 'measure' && this.root === 'score-timewise') this.enterMeasure(element);
    const outer = this.root === 'score-partwise' ? 'part' : 'measure';
    return ancestors.length === 0 || (ancestors.length === 1 && name === outer) ? 'enter' : 'whole';
  }

  take(element: XmlElement, ancestors: readonly XmlFrame[]): void {
    const parent = ancestors[ancestors.length - 1];
    if (ancestors.length === 1) return this.takeHead(element);
    if (!parent || ancestors.length !== 2) return;
    if (parent.name === 'part' && element.name === 'measure') this.takeMeasure(parent, element, element);
    if (parent.name === 'measure' && element.name === 'part') this.takeMeasure(element, parent, element);
  }

  finish(): ScoreHead {
    return this.head;
  }

  private enterRoot(name: string, line: number): void {
    this.root = name;
    if (name === 'score-partwise' || name === 'score-timewise') return;
    const what = name === 'opus' ? 'a list of scores (opus); upload the scores themselves' : 'not MusicXML; export the score as MusicXML';
    refuse('not_musicxml', `The file’s outermost element is <${name.slice(0, 40)}>: this is ${what}.`, { line, element: name });
  }

  private enterPart(part: XmlFrame): void {
    const id = part.attributes['id'] ?? '';
    if (this.parts.has(id)) refuseDuplicate(id, part.line);
    this.openPart(id);
  }

  private enterMeasure(measure: XmlFrame): void {
    this.addBar(this.measures, measure);
    this.measures += 1;
  }

  private openPart(id: string): PartState {
    const part: PartState = {
      index: this.head.parts.length, id, staves: 1, divisions: { num: 1, den: 1 },
      transpositions: new Map(), atConcertPitch: this.atConcertPitch, bars: 0, graces: [],
    };
    this.parts.set(id, part);
    this.head.parts.push(part);
    return part;
  }

  private takeMeasure(partFrame: XmlFrame, measureFrame: XmlFrame, element: XmlElement): void {
    const id = partFrame.attributes['id'] ?? '';
    const part = this.parts.get(id) ?? this.openPart(id);
    if (this.root === 'score-timewise') this.alignPart(part, element);
    else this.addBar(part.bars, measureFrame);
    readMeasure(this.draft, part, element, this.watch);
  }

  /** In a timewise file a part may be missing from a bar, but cannot be in it twice. */
  private alignPart(part: PartState, element: XmlElement): void {
    if (part.bars >= this.measures) refuseDuplicate(part.id, element.line);
    part.bars = this.measures - 1;
  }

  /** Bars are those of the first part; a longer part adds its own at the end. */
  private addBar(index: number, { attributes }: XmlFrame): void {
    if (index < this.draft.bars.length) return;
    this.draft.bars.push({ number: attributes['number']?.trim() ?? '', implicit: attributes['implicit'] === 'yes', length: 0 });
  }

  private takeHead(element: XmlElement): void {
    const { head } = this;
    if (element.name === 'work') head.work = findText(element, 'work-title') ?? '';
    if (element.name === 'movement-title') head.movement = element.text.trim();
    if (element.name === 'identification') head.composer = composerOf(element);
    if (element.name === 'credit') head.credits.push(element);
    if (element.name === 'defaults') this.atConcertPitch = findChild(element, 'concert-score') !== undefined;
    if (element.name === 'part-list') readPartList(head, element);
  }
}

function composerOf(identification: XmlElement): string {
  const creators = identification.children.filter(({ name }) => name === 'creator');
  const composer = creators.find(({ attributes }) => attributes['type'] === 'composer') ?? creators.find(({ attributes }) => !attributes['type']);
  return composer?.text.trim() ?? '';
}

function readPartList(head: ScoreHead, list: XmlElement): void {
  for (const scorePart of list.children) {
    if (scorePart.name !== 'score-part') continue;
    const id = scorePart.attributes['id'] ?? '';
    if (id !== '' && head.partNames.has(id)) refuseDuplicate(id, scorePart.line);
    head.partNames.set(id, findText(scorePart, 'part-name') ?? '');
  }
}

function refuseDuplicate(id: string, line: number): never {
  return refuse('duplicate_part', `Line ${line}: the part “${id.slice(0, 40)}” is there twice. Export the file again.`, { line, element: 'part' });
}
