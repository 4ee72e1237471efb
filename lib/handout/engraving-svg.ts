import { XMLBuilder, XMLParser } from 'fast-xml-parser';

/** One system as drawn: SVG shapes in the engraving's coordinates, and what they enclose. */
export interface EngravedSystem {
  readonly svg: string;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  /** Where each mark of this system stands: its left edge and the common baseline. */
  readonly marks: ReadonlyMap<string, { readonly x: number; readonly y: number }>;
}

interface SvgNode {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly SvgNode[];
  /** Text of a text node, whose name is `#text`. */
  readonly text: string;
}

/** What a system encloses; grown while its shapes are read. */
interface Extent {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const PARSER = new XMLParser({
  preserveOrder: true,
  ignoreAttributes: false,
  attributeNamePrefix: '',
  trimValues: false,
  parseTagValue: false,
  parseAttributeValue: false,
});
const BUILDER = new XMLBuilder({ preserveOrder: true, ignoreAttributes: false, attributeNamePrefix: '', suppressEmptyNode: true });

/** Takes the engraver's page apart into glyph definitions and systems. Throws when the page has no systems' layer. */
export function readEngraving(svg: string): { definitions: string; systems: EngravedSystem[] } {
  const root = toNodes(PARSER.parse(svg) as RawNode[]);
  const systems = findAll(root, (node) => hasClass(node, 'system'));
  const definitions = findAll(root, (node) => node.name === 'defs').flatMap((node) => node.children);
  return { definitions: write(definitions.map(withoutSpace)), systems: systems.map(readSystem) };
}

function readSystem(system: SvgNode): EngravedSystem {
  const extent: Extent = { left: Infinity, right: -Infinity, top: Infinity, bottom: -Infinity };
  const marks = new Map<string, { x: number; y: number }>();
  const shapes = system.children.flatMap((node) => readShape(node, { extent, marks, text: {} }));
  return { svg: write(shapes), ...extent, marks };
}

interface Reading {
  readonly extent: Extent;
  readonly marks: Map<string, { x: number; y: number }>;
  /** Text style that the engraver gives by class in a style sheet: written out here, as a PDF knows no style sheets. */
  readonly text: Readonly<Record<string, string>>;
}

const TEXT_STYLES: readonly (readonly [string, Readonly<Record<string, string>>])[] = [
  ['ending', { 'font-weight': 'bold' }],
  ['fing', { 'font-weight': 'bold' }],
  ['reh', { 'font-weight': 'bold' }],
  ['tempo', { 'font-weight': 'bold' }],
  ['dir', { 'font-style': 'italic' }],
  ['dynam', { 'font-style': 'italic' }],
  ['mNum', { 'font-style': 'italic' }],
];
const STROKED = new Set(['ellipse', 'path', 'polygon', 'polyline', 'rect']);

function readShape(node: SvgNode, reading: Reading): SvgNode[] {
  if (hasClass(node, 'bounding-box')) {
    findAll([node], (child) => child.name === 'rect').forEach((box) => grow(reading.extent, box.attributes));
    return [];
  }
  if (hasClass(node, 'harm')) return takeMark(node, reading);
  if (node.name === '#text') return node.text.trim() === '' ? [] : [node];
  const style = TEXT_STYLES.find(([name]) => hasClass(node, name))?.[1] ?? {};
  const inside = { ...reading, text: { ...reading.text, ...style } };
  const children = node.children.flatMap((child) => readShape(child, inside));
  if (node.name === 'g' && children.length === 0) return [];
  return [{ ...node, attributes: writtenAttributes(node, inside.text), children }];
}

function writtenAttributes(node: SvgNode, text: Readonly<Record<string, string>>): Record<string, string> {
  const { id: _id, class: _class, ...rest } = node.attributes as Record<string, string>;
  if (STROKED.has(node.name) && !rest.stroke) return { ...rest, stroke: 'currentColor' };
  return node.name === 'text' ? { ...text, ...rest } : rest;
}

function takeMark(node: SvgNode, reading: Reading): SvgNode[] {
  const text = findAll([node], (child) => child.name === 'text')[0];
  const id = node.attributes.id;
  if (id && text) reading.marks.set(id, { x: Number(text.attributes.x), y: Number(text.attributes.y) });
  return [];
}

function grow(extent: Extent, box: Readonly<Record<string, string>>): void {
  const [x, y, width, height] = [box.x, box.y, box.width, box.height].map(Number) as [number, number, number, number];
  extent.left = Math.min(extent.left, x);
  extent.right = Math.max(extent.right, x + width);
  extent.top = Math.min(extent.top, y);
  extent.bottom = Math.max(extent.bottom, y + height);
}

function hasClass(node: SvgNode, name: string): boolean {
  return (node.attributes.class ?? '').split(' ').includes(name) && (name === 'bounding-box' || !isBox(node));
}

function isBox(node: SvgNode): boolean {
  return (node.attributes.class ?? '').split(' ').includes('bounding-box');
}

/** Outermost nodes that satisfy the test. */
function findAll(nodes: readonly SvgNode[], test: (node: SvgNode) => boolean): SvgNode[] {
  return nodes.flatMap((node) => (test(node) ? [node] : findAll(node.children, test)));
}

function withoutSpace(node: SvgNode): SvgNode {
  const children = node.children.filter((child) => child.name !== '#text' || child.text.trim() !== '').map(withoutSpace);
  return { ...node, children };
}

type RawNode = Readonly<Record<string, unknown>>;

function toNodes(raw: readonly RawNode[]): SvgNode[] {
  return raw.map((node) => {
    const attributes = (node[':@'] ?? {}) as Readonly<Record<string, string>>;
    if ('#text' in node) return { name: '#text', attributes, children: [], text: String(node['#text']) };
    const name = Object.keys(node).find((key) => key !== ':@') as string;
    return { name, attributes, children: toNodes(node[name] as RawNode[]), text: '' };
  });
}

function write(nodes: readonly SvgNode[]): string {
  return BUILDER.build(nodes.map(toRaw)) as string;
}

function toRaw(node: SvgNode): RawNode {
  if (node.name === '#text') return { '#text': node.text };
  return { [node.name]: node.children.map(toRaw), ':@': node.attributes };
}
