import type { NumeralPieces } from './numeral-format';

/**
 * A numeral in words, for a screen reader and for the alternative text of a printed label: “two half-diminished, six
 * five”, “five seven of five”. Accidentals come first, as a teacher says them.
 */
const STEP_WORDS: Readonly<Record<string, string>> = { I: 'one', II: 'two', III: 'three', IV: 'four', V: 'five', VI: 'six', VII: 'seven' };

const NAME_WORDS: Readonly<Record<string, string>> = {
  It: 'Italian sixth',
  Fr: 'French sixth',
  Ger: 'German sixth',
  Sw: 'Swiss sixth',
  N: 'Neapolitan',
  CT: 'common-tone',
  Cad: 'cadential',
};

const MARK_WORDS: Readonly<Record<NumeralPieces['mark'], string>> = {
  '': '',
  '°': 'diminished',
  ø: 'half-diminished',
  '+': 'augmented',
  '?': 'unstated',
  M: 'major',
  m: 'minor',
};

const SEVENTH_WORDS: Readonly<Record<NumeralPieces['seventh'], string>> = { '': '', maj: 'major', dom: 'dominant', min: 'minor' };

const DIGIT_WORDS: Readonly<Record<string, string>> = { '2': 'two', '3': 'three', '4': 'four', '5': 'five', '6': 'six', '7': 'seven', '9': 'nine' };

const NOTE_WORDS: Readonly<Record<string, string>> = {
  pass: 'passing',
  ped: 'pedal',
  arp: 'arpeggiated',
  plain: 'plain',
  min: 'minor',
  maj: 'major',
  sus2: 'suspended second',
  sus4: 'suspended fourth',
  add4: 'added fourth',
  add6: 'added sixth',
  add9: 'added ninth',
  '♭9': 'flat nine',
  '♮9': 'natural nine',
};

/** One chord in words, without its targets. */
export function speakPieces(pieces: NumeralPieces): string {
  const { signs, letters, mark, seventh, figures, notes } = pieces;
  const chord = [speakSigns(signs), speakLetters(pieces), mark === '+' && letters in NAME_WORDS ? '' : MARK_WORDS[mark], SEVENTH_WORDS[seventh]];
  const spoken = [...chord, ...figures.map(speakFigure), ...notes.map((note) => NOTE_WORDS[note] ?? note)];
  return spoken.filter((word) => word !== '').join(' ');
}

/** Capitals are major and small letters minor: what the ear cannot see in the letter is said. */
function speakLetters({ letters, isName, mark, signs }: NumeralPieces): string {
  if (letters.startsWith('Ped')) return ['pedal', ...letters.slice(3).trim().split(/(?=[IV])/).slice(0, 1).map(() => letters.slice(3).trim()).filter(Boolean).map(speakHeld)].join(' ');
  if (isName) return NAME_WORDS[letters] ?? letters;
  const word = STEP_WORDS[letters.toUpperCase()] ?? letters;
  const isSmall = letters !== letters.toUpperCase();
  return isSmall && mark === '' && signs !== undefined ? `minor ${word}` : word;
}

function speakHeld(held: string): string {
  const roman = held.replace(/[♭♯♮]/gu, '');
  return `on ${[speakSigns(held.startsWith('♭') ? -1 : held.startsWith('♯') ? 1 : 0), STEP_WORDS[roman] ?? roman].filter(Boolean).join(' ')}`;
}

function speakSigns(signs: NumeralPieces['signs']): string {
  if (signs === 'natural') return 'natural';
  const count = Math.abs(signs);
  if (count === 0) return '';
  return `${count > 1 ? 'double ' : ''}${signs < 0 ? 'flat' : 'sharp'}`;
}

function speakFigure(figure: string): string {
  const digit = DIGIT_WORDS[figure.slice(-1)] ?? figure;
  if (figure.startsWith('♭')) return `flat ${digit}`;
  return figure.startsWith('♮') ? `natural ${digit}` : digit;
}
