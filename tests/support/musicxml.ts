/** Short MusicXML texts for tests. */

interface NoteOptions {
  readonly duration?: number;
  readonly voice?: string;
  readonly staff?: number;
  readonly chord?: boolean;
  /** Extra children before the duration (`<grace/>`, `<cue/>`). */
  readonly before?: string;
  /** Extra children after it (ties, notations). */
  readonly after?: string;
}

/** `note('C#4', {duration: 2})`; `note('r')` is a rest. */
export function note(pitch: string, { duration = 1, voice = '1', staff, chord, before = '', after = '' }: NoteOptions = {}): string {
  const what = pitch === 'r' ? '<rest/>' : pitchXml(pitch);
  const length = before.includes('<grace') ? '' : `<duration>${duration}</duration>`;
  const place = `<voice>${voice}</voice>${staff === undefined ? '' : `<staff>${staff}</staff>`}`;
  const [ties, rest] = [after.match(/<tie [^>]*>/g)?.join('') ?? '', after.replace(/<tie [^>]*>/g, '')];
  return `<note>${before}${chord ? '<chord/>' : ''}${what}${length}${ties}${place}${rest}</note>`;
}

function pitchXml(text: string): string {
  const match = /^([A-G])(#*|b*)(\d)$/.exec(text);
  if (!match) throw new Error(`not a pitch: ${text}`);
  const [, step, signs = '', octave] = match;
  const alter = signs.startsWith('b') ? -signs.length : signs.length;
  return `<pitch><step>${step}</step>${alter === 0 ? '' : `<alter>${alter}</alter>`}<octave>${octave}</octave></pitch>`;
}

export function backup(duration: number): string {
  return `<backup><duration>${duration}</duration></backup>`;
}

export function forward(duration: number): string {
  return `<forward><duration>${duration}</duration></forward>`;
}

export function attributes(content: string): string {
  return `<attributes>${content}</attributes>`;
}

export function time(beats: string, beatType: number): string {
  return `<time><beats>${beats}</beats><beat-type>${beatType}</beat-type></time>`;
}

/** Bars, each its content or `[attributes of the measure element, content]`. */
type BarXml = string | readonly [string, string];

function measureXml(bar: BarXml, i: number): string {
  const [facts, content] = typeof bar === 'string' ? [`number="${i + 1}"`, bar] : bar;
  return `<measure ${facts}>\n${content}\n</measure>\n`;
}

/** A partwise score of these parts. */
export function partwise(...parts: readonly (readonly BarXml[])[]): string {
  const list = parts.map((_, i) => `<score-part id="P${i + 1}"><part-name>Part ${i + 1}</part-name></score-part>`).join('');
  const bodies = parts.map((bars, i) => `<part id="P${i + 1}">\n${bars.map(measureXml).join('')}</part>\n`).join('');
  return `<?xml version="1.0" encoding="UTF-8"?>\n<score-partwise version="4.0">\n<part-list>${list}</part-list>\n${bodies}</score-partwise>\n`;
}

/** One part; its first bar gets 4/4 and one division a quarter unless it says otherwise. */
export function onePart(...bars: readonly BarXml[]): string {
  return partwise(bars);
}
