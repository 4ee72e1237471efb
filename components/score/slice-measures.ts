/**
 * A MusicXML document cut down to some of its bars, for the engraver only: an engraver that reads 500 bars to draw 16 is
 * slow. The attributes in force at the cut (divisions, key, time, clefs, transposition) open the first bar kept.
 */

/** Children of <attributes> that stay in force; those with `number` are kept per staff. */
const LASTING = ['divisions', 'key', 'time', 'staves', 'part-symbol', 'instruments', 'clef', 'staff-details', 'transpose'];

/** `first` and `last`: 0-based places of the bars kept, in file order, the last included. The document is not changed. */
export function sliceMeasures(document: Document, first: number, last: number): Document {
  const copy = document.implementation.createDocument(null, null);
  const root = copy.importNode(document.documentElement, false);
  copy.append(root);
  // Only what is kept is copied: of a long score that is little.
  for (const child of document.documentElement.children) root.append(child.tagName === 'part' ? slicePart(copy, child, first, last) : copy.importNode(child, true));
  return copy;
}

function slicePart(copy: Document, part: Element, first: number, last: number): Element {
  const kept = copy.importNode(part, false);
  const measures = [...part.children].filter((child) => child.tagName === 'measure');
  const inForce = new Map<string, Element>();
  for (const measure of measures.slice(0, first)) collectAttributes(measure, inForce);
  for (const measure of measures.slice(first, last + 1)) kept.append(copy.importNode(measure, true));
  const opening = kept.firstElementChild;
  if (!opening || first === 0) return kept;
  openWith(opening, inForce);
  dropLooseEnds(kept);
  return kept;
}

function collectAttributes(measure: Element, inForce: Map<string, Element>): void {
  for (const attributes of measure.querySelectorAll(':scope > attributes')) {
    for (const child of attributes.children) {
      if (LASTING.includes(child.tagName)) inForce.set(`${child.tagName} ${child.getAttribute('number') ?? ''}`, child);
    }
  }
}

function openWith(measure: Element, inForce: Map<string, Element>): void {
  const leading = findLeadingAttributes(measure);
  for (const child of leading?.children ?? []) inForce.set(`${child.tagName} ${child.getAttribute('number') ?? ''}`, child);
  const opening = measure.ownerDocument.createElement('attributes');
  const elements = [...inForce.values()].sort((a, b) => LASTING.indexOf(a.tagName) - LASTING.indexOf(b.tagName));
  for (const element of elements) opening.append(measure.ownerDocument.importNode(element, true));
  leading?.remove();
  measure.prepend(opening);
}

/** The <attributes> that stand before the bar's first note, if any. */
function findLeadingAttributes(measure: Element): Element | null {
  for (const child of measure.children) {
    if (child.tagName === 'attributes') return child;
    if (['note', 'backup', 'forward'].includes(child.tagName)) return null;
  }
  return null;
}

const PAIRED = ['slur', 'wedge', 'octave-shift', 'pedal', 'dashes', 'bracket', 'tied', 'tie', 'glissando', 'slide', 'wavy-line'];

/** Ends whose beginnings were cut away would trip the engraver; each is dropped. */
function dropLooseEnds(part: Element): void {
  const open = new Set<string>();
  for (const element of part.querySelectorAll(PAIRED.join(','))) {
    const name = `${element.tagName} ${element.getAttribute('number') ?? '1'} ${pitchKey(element)}`;
    const type = element.getAttribute('type') ?? '';
    if (type === 'stop' || type === 'continue') {
      if (!open.has(name)) element.remove();
      if (type === 'stop') open.delete(name);
    } else open.add(name);
  }
}

/** Ties are told apart by pitch, not by number. */
function pitchKey(element: Element): string {
  if (element.tagName !== 'tie' && element.tagName !== 'tied') return '';
  return element.closest('note')?.querySelector('pitch')?.textContent?.replace(/\s+/g, '') ?? '';
}
