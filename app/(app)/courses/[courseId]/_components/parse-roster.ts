import Papa from 'papaparse';

/** One line of a pasted or uploaded list as it was understood. */
export interface RosterLine {
  /** 1-based line of the list. */
  readonly line: number;
  readonly name: string;
  /** Lower case. */
  readonly email: string;
  /** Why the line cannot be taken; null when it can. */
  readonly problem: string | null;
}

/** A plausible address; the server asks again, and the mail is what proves it. */
const EMAIL = /^[^\s@,;]+@[^\s@,;]+\.[^\s@,;]+$/u;

/**
 * Reads a list of people: name and e-mail in either order, separated by commas, semicolons or tabs, with or without a
 * header row; `Name <e-mail>` and bare e-mails too. More columns are ignored. Empty lines are left out.
 */
export function parseRoster(text: string): RosterLine[] {
  const { data } = Papa.parse<string[]>(text.replace(/^\uFEFF/u, ''), { delimiter: delimiterOf(text) });
  const rows = data.map((cells, i) => ({ line: i + 1, cells: cells.map((cell) => cell.trim()) }));
  const filled = rows.filter(({ cells }) => cells.some(Boolean));
  const [first] = filled;
  const people = first && isHeader(first.cells) ? filled.slice(1) : filled;
  const seen = new Set<string>();
  return people.map((row) => {
    const read = readRow(row.line, row.cells);
    const again = read.problem === null && seen.has(read.email);
    seen.add(read.email);
    return again ? { ...read, problem: 'This e-mail is in the list already.' } : read;
  });
}

function delimiterOf(text: string): string {
  const counts = [',', ';', '\t'].map((mark) => ({ mark, count: text.split(mark).length }));
  return counts.reduce((a, b) => (b.count > a.count ? b : a)).mark;
}

function isHeader(cells: readonly string[]): boolean {
  return !cells.some((cell) => cell.includes('@')) && cells.some((cell) => /e-?mail/iu.test(cell));
}

function readRow(line: number, cells: readonly string[]): RosterLine {
  const found = cells.map(addressIn).find(Boolean);
  const name = cells.map(withoutAddress).filter((cell) => cell && !cell.includes('@')).slice(0, 2).join(' ');
  if (!found) return { line, name: name || cells.join(' '), email: '', problem: cells.some((cell) => cell.includes('@')) ? 'The e-mail is not complete.' : 'There is no e-mail in this line.' };
  return { line, name, email: found.toLowerCase(), problem: null };
}

function addressIn(cell: string): string | null {
  const inside = /<([^<>]+)>/u.exec(cell)?.[1]?.trim() ?? cell;
  return EMAIL.test(inside) ? inside : null;
}

function withoutAddress(cell: string): string {
  return cell.replace(/<[^<>]*>/u, '').trim();
}
