import Papa from 'papaparse';
import type { Gradebook } from './gradebook';

/** What a spreadsheet would take for a formula is made plain text by an apostrophe before it. */
export function plainCell(text: string): string {
  return /^[=+\-@\t\r\n\uFF0B\uFF0D\uFF1D\uFF20]/u.test(text) ? `'${text}` : text;
}

/**
 * The gradebook as CSV (RFC 4180, UTF-8 with a byte order mark for spreadsheets): a row a student; per assignment the
 * points, the most points and the state; then the sum of what is marked.
 */
export function formatGradebook({ assignments, rows }: Gradebook): string {
  const heads = assignments.flatMap(({ title }) => [`${title}: points`, `${title}: of`, `${title}: state`]);
  const lines = rows.map(({ student, cells, points, maxPoints }) => [
    plainCell(student.name),
    plainCell(student.email),
    ...cells.flatMap((cell) => [numberText(cell?.points), numberText(cell?.maxPoints), cell ? cell.state.replace('_', ' ') : 'nothing handed in']),
    numberText(points),
    numberText(maxPoints),
  ]);
  const fields = ['Name', 'E-mail', ...heads.map(plainCell), 'Sum: points', 'Sum: of'];
  return `\uFEFF${Papa.unparse({ fields, data: lines }, { newline: '\r\n' })}\r\n`;
}

function numberText(value: number | null | undefined): string {
  return value === null || value === undefined ? '' : String(value);
}
