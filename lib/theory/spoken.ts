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
  Ped: 'pedal',
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
  const { signs, letters, isName, mark, held, seventh, figures, notes } = pieces;
  const words = [
    speakSigns(signs),
    isName ? (NAME_WORDS[letters] ?? letters) : speakRoman(letters, mark),
    // In Ger+6 the plus belongs to the sixth, not to a triad.
    isName && mark === '+' ? '' : MARK_WORDS[mark],
    held && `on ${speakHeld(held)}`,
    SEVENTH_WORDS[seventh],
    ...figures.map(speakFigure),
    ...notes.map((note) => NOTE_WORDS[note] ?? note),
  ];
  return words.filter((word) => word !== '').join(' ');
}

/** The ear cannot see a small letter: without a mark that says more it is a minor chord. */
function speakRoman(letters: string, mark: NumeralPieces['mark']): string {
  const word = STEP_WORDS[letters.toUpperCase()] ?? letters;
  return letters === letters.toUpperCase() || mark !== '' ? word : `minor ${word}`;
}

function speakHeld(held: string): string {
  const letters = held.replace(/^[♭♯]+/u, '');
  const signs = held.length - letters.length;
  return [speakSigns(held.startsWith('♭') ? -signs : signs), STEP_WORDS[letters] ?? letters].filter(Boolean).join(' ');
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
