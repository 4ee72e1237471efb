import { equalKeys, formatKey } from '../theory/key';
import { checkNumeral } from '../theory/numeral';
import { type Reading } from './reading';

interface Span {
  readonly start: number;
  readonly end: number;
}

/** What is wrong with a reading as a value, in sentences; [] for a sound one: labels and regions tile it, ids are unique, keys agree. */
export function validateReading(reading: Reading): string[] {
  const { labels, regions } = reading;
  const ids = new Set(labels.map((label) => label.id));
  return [
    ...(labels.length > 0 ? checkTiling('label', labels, reading) : []),
    ...(regions.length > 0 || labels.length > 0 ? checkTiling('key region', regions, reading) : []),
    ...(ids.size === labels.length ? [] : ['Two labels share an id.']),
    ...labels.flatMap((label) => checkKey(reading, label.start, label)),
    ...labels.flatMap((label) => (label.numeral ? checkNumeral(label.numeral).map((finding) => `At ${label.start}: ${finding}`) : [])),
    ...labels.flatMap((label) => checkCertainty(label.start, [label.certainty ?? 0, ...label.others.map((other) => other.certainty)])),
  ];
}

function checkTiling(what: string, spans: readonly Span[], whole: Span): string[] {
  const findings: string[] = [];
  let at = whole.start;
  for (const { start, end } of spans) {
    if (start !== at) findings.push(`A ${what} starts at ${start} where ${at} was expected.`);
    if (end <= start) findings.push(`A ${what} at ${start} has no length.`);
    at = end;
  }
  if (at !== whole.end) findings.push(`The ${what}s end at ${at}, the reading at ${whole.end}.`);
  return findings;
}

function checkKey({ regions }: Reading, at: number, { key }: Reading['labels'][number]): string[] {
  const region = regions.find(({ start, end }) => start <= at && at < end);
  if (!region) return [`No key region at ${at}.`];
  return equalKeys(region.key, key) ? [] : [`The label at ${at} is in ${formatKey(key)}, its region in ${formatKey(region.key)}.`];
}

function checkCertainty(at: number, certainties: readonly number[]): string[] {
  return certainties.every((certainty) => certainty >= 0 && certainty <= 1 + 1e-9) ? [] : [`At ${at}: a certainty outside 0 to 1.`];
}
