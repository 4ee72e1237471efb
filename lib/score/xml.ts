import { SaxesParser, type SaxesTagPlain } from 'saxes';
import type { ScoreLimits } from './limits';
import { refuse } from './refusal';

/** An element with all that is in it. `start` and `end` are offsets into the text: of its `<`, and behind its last `>`. */
export interface XmlElement {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string | undefined>>;
  readonly children: XmlElement[];
  /** The text directly inside; whitespace around it is kept. */
  text: string;
  readonly line: number;
  readonly start: number;
  end: number;
}

/** An open element that is not itself gathered: the root, or a part that streams by. */
export interface XmlFrame {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string | undefined>>;
  readonly line: number;
}

/**
 * What to do with elements as they stream by. At every element outside a gathered one `gather` is asked:
 * 'whole' gathers it with its content and hands it to `take`; 'enter' looks at its children one by one.
 */
export interface XmlSink {
  gather(element: XmlFrame, ancestors: readonly XmlFrame[]): 'whole' | 'enter';
  take(element: XmlElement, ancestors: readonly XmlFrame[]): void;
  /** Names of elements that are passed over with all that is in them. */
  readonly skip: ReadonlySet<string>;
  /** Called with the root element's frame when it has ended, and with every entered element's. */
  leave?(element: XmlFrame): void;
}

/**
 * Reads XML text once, from start to end, keeping no more than one gathered element in memory. Refuses text that is not
 * well-formed (with its line), entities other than XML's own five, and nesting or bars beyond the limits.
 */
export function streamXml(text: string, sink: XmlSink, limits: Pick<ScoreLimits, 'depth' | 'barElements' | 'notes'>): void {
  new XmlStream(text, sink, limits).run();
}

class XmlStream {
  private readonly parser = new SaxesParser();
  private readonly frames: XmlFrame[] = [];
  private readonly open: XmlElement[] = [];
  private skipDepth = 0;
  private depth = 0;
  private gathered = 0;
  private notes = 0;

  constructor(
    private readonly text: string,
    private readonly sink: XmlSink,
    private readonly limits: Pick<ScoreLimits, 'depth' | 'barElements' | 'notes'>,
  ) {
    this.parser.on('error', (error) => refuseBroken(error.message, this.parser.line));
    this.parser.on('doctype', (doctype) => refuseEntities(doctype, this.parser.line));
    this.parser.on('opentag', (tag) => this.enter(tag));
    this.parser.on('closetag', () => this.leave());
    const addText = (piece: string) => this.addText(piece);
    this.parser.on('text', addText);
    this.parser.on('cdata', addText);
  }

  run(): void {
    this.parser.write(this.text).close();
  }

  private enter(tag: SaxesTagPlain): void {
    this.depth += 1;
    if (this.depth > this.limits.depth) this.refuseDepth(tag.name);
    if (this.skipDepth > 0 || this.sink.skip.has(tag.name)) {
      this.skipDepth += 1;
      return;
    }
    if (this.open.length === 0 && this.sink.gather(this.frameOf(tag), this.frames) === 'enter') {
      this.frames.push(this.frameOf(tag));
      return;
    }
    this.openElement(tag);
  }

  private frameOf(tag: SaxesTagPlain): XmlFrame {
    return { name: tag.name, attributes: tag.attributes, line: this.parser.line };
  }

  private openElement(tag: SaxesTagPlain): void {
    this.count(tag.name);
    const element: XmlElement = {
      name: tag.name,
      attributes: tag.attributes,
      children: [],
      text: '',
      line: this.parser.line,
      // A raw `<` cannot stand inside a tag, so the nearest one before the tag's end is its start.
      start: this.text.lastIndexOf('<', this.parser.position - 1),
      end: this.parser.position,
    };
    this.open[this.open.length - 1]?.children.push(element);
    this.open.push(element);
  }

  private count(name: string): void {
    this.gathered += 1;
    if (name === 'note') this.notes += 1;
    const { line } = this.parser;
    if (this.notes > this.limits.notes) {
      refuse('score_too_long', `This score has more than ${this.limits.notes} notes. Split it into movements.`, { line, element: name });
    }
    if (this.gathered > this.limits.barElements) {
      refuse('score_too_long', `One bar holds more than ${this.limits.barElements} elements. This cannot be a score.`, { line, element: name });
    }
  }

  private addText(piece: string): void {
    const element = this.open[this.open.length - 1];
    if (element && this.skipDepth === 0 && element.children.length === 0) element.text += piece;
  }

  private leave(): void {
    this.depth -= 1;
    if (this.skipDepth > 0) {
      this.skipDepth -= 1;
      return;
    }
    const element = this.open.pop();
    if (!element) {
      const frame = this.frames.pop();
      if (frame) this.sink.leave?.(frame);
      return;
    }
    element.end = this.parser.position;
    if (this.open.length > 0) return;
    this.gathered = 0;
    this.sink.take(element, this.frames);
  }

  private refuseDepth(element: string): never {
    return refuse('xml_too_deep', `Elements are nested more than ${this.limits.depth} deep. This cannot be a score.`, {
      line: this.parser.line,
      element,
    });
  }
}

/** The XML reader's message is `line:column: what`. */
function refuseBroken(message: string, line: number): never {
  const what = message.replace(/^(?:\d+:)?\d+:\d+: /, '').replace(/\.$/, '');
  if (/entity/.test(what)) {
    return refuse('xml_entities', `Line ${line} uses an entity that XML does not know (${what}). Export the file again without it.`, { line });
  }
  return refuse('xml_broken', `The XML breaks off or is faulty at line ${line}: ${what}. Export the file again.`, { line });
}

/** A plain DOCTYPE that names MusicXML's DTD is usual and is not fetched; one that declares entities is an attack or a mistake. */
function refuseEntities(doctype: string, line: number): void {
  if (!/<!ENTITY/.test(doctype)) return;
  refuse('xml_entities', `Line ${line} declares entities in its DOCTYPE. Scores need none; remove the declaration.`, { line, element: '!DOCTYPE' });
}

export function findChild(element: XmlElement, name: string): XmlElement | undefined {
  return element.children.find((child) => child.name === name);
}

export function findChildren(element: XmlElement, name: string): XmlElement[] {
  return element.children.filter((child) => child.name === name);
}

/** The trimmed text of the first child of that name; undefined without one. */
export function findText(element: XmlElement, name: string): string | undefined {
  return findChild(element, name)?.text.trim();
}
