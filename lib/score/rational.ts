/** Exact fractions of whole numbers for reading written times. Numbers stay within 2^53; callers bound their input. */
export interface Rational {
  readonly num: number;
  /** Above 0. */
  readonly den: number;
}

export function gcd(a: number, b: number): number {
  let [x, y] = [Math.abs(a), Math.abs(b)];
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

export function lcm(a: number, b: number): number {
  return (a / gcd(a, b)) * b;
}

export function rational(num: number, den = 1): Rational {
  const divisor = gcd(num, den) || 1;
  return { num: num / divisor, den: den / divisor };
}

export function add(a: Rational, b: Rational): Rational {
  return rational(a.num * b.den + b.num * a.den, a.den * b.den);
}

/** Reads `12`, `-3`, `0.25`, `.5`, with at most nine digits on either side; undefined for anything else. */
export function parseDecimal(text: string): Rational | undefined {
  const match = /^([+-]?)(\d{0,9})(?:\.(\d{0,9}))?$/.exec(text.trim());
  if (!match || !(match[2] || match[3])) return undefined;
  const places = (match[3] ?? '').replace(/0+$/, '').slice(0, 6);
  const num = Number(`${match[2]}${places}`);
  return rational(match[1] === '-' ? -num : num, 10 ** places.length);
}

/** Reads a whole number of at most nine digits; undefined for anything else. */
export function parseInteger(text: string | undefined): number | undefined {
  return text !== undefined && /^[+-]?\d{1,9}$/.test(text.trim()) ? Number(text) : undefined;
}

/** `3`, `1/2`, `-7/4`: as in the report contract. */
export function formatRational(value: Rational): string {
  const { num, den } = rational(value.num, value.den);
  return den === 1 ? String(num) : `${num}/${den}`;
}
