import { describe, expect, it } from 'vitest';
import { readScore } from '@/lib/score/read-score';
import { attributes, backup, forward, note, onePart, partwise, time } from '../../support/musicxml';
import { barsText, mustRead, notesText, pitchText, quarters } from '../../support/score-text';

// Source of what each element means: W3C MusicXML 4.0 reference, the element's own page, unless a test says otherwise.

const tie = (type: string) => `<tie type="${type}"/>`;
const tied = (type: string) => `<notations><tied type="${type}"/></notations>`;
const tuplet = '<time-modification><actual-notes>3</actual-notes><normal-notes>2</normal-notes></time-modification>';

describe('readScoreText: layouts and encodings', () => {
  const music = (title: string) => `<work><work-title>${title}</work-title></work><part-list><score-part id="P1"><part-name>a</part-name></score-part></part-list>`;
  const xml = (encoding: string, title: string) =>
    `<?xml version="1.0" encoding="${encoding}"?><score-partwise>${music(title)}<part id="P1"><measure number="1">${note('C4', { duration: 4 })}</measure></part></score-partwise>`;
  const titleOf = (bytes: Uint8Array) => {
    const result = readScore(bytes);
    return result.ok ? result.value.title : result.error.code;
  };
  const utf16 = (text: string, littleEndian: boolean) => {
    const bytes = new Uint8Array(2 * text.length);
    [...text].forEach((sign, i) => new DataView(bytes.buffer).setUint16(2 * i, sign.charCodeAt(0), littleEndian));
    return bytes;
  };

  it('reads a timewise score like the partwise one', () => {
    const bar = (content: string, content2: string, number: number) => `<measure number="${number}"><part id="P1">${content}</part><part id="P2">${content2}</part></measure>`;
    const timewise = `<score-timewise>${music('x')}${bar(note('C5', { duration: 4 }), note('C3', { duration: 4 }), 1)}${bar(note('D5', { duration: 4 }), note('D3', { duration: 4 }), 2)}</score-timewise>`;
    const same = partwise([note('C5', { duration: 4 }), note('D5', { duration: 4 })], [note('C3', { duration: 4 }), note('D3', { duration: 4 })]);
    expect(notesText(mustRead(timewise))).toBe(notesText(mustRead(same)));
    expect(notesText(mustRead(timewise))).toBe('C5@0:4 C3@0:4 D5@4:4 D3@4:4');
  });

  it('reads UTF-8 with and without a byte order mark', () => {
    expect(titleOf(new TextEncoder().encode(xml('UTF-8', 'Für Ö')))).toBe('Für Ö');
    expect(titleOf(new TextEncoder().encode(`\uFEFF${xml('UTF-8', 'Für Ö')}`))).toBe('Für Ö');
  });

  it('reads UTF-16 in both byte orders, with and without a mark', () => {
    for (const littleEndian of [true, false]) {
      expect(titleOf(utf16(`\uFEFF${xml('UTF-16', 'Für ♭')}`, littleEndian))).toBe('Für ♭');
      expect(titleOf(utf16(xml('UTF-16', 'Für ♭'), littleEndian))).toBe('Für ♭');
    }
  });

  it('reads Latin-1', () => {
    expect(titleOf(Uint8Array.from(xml('ISO-8859-1', 'Für Ö'), (sign) => sign.charCodeAt(0)))).toBe('Für Ö');
  });

  it('takes a UTF-8 file for what it is though it says UTF-16', () => {
    expect(titleOf(new TextEncoder().encode(xml('UTF-16', 'Für')))).toBe('Für');
  });

  it('keeps a plain DOCTYPE out of the way', () => {
    const doctype = '<!DOCTYPE score-partwise PUBLIC "-//Recordare//DTD MusicXML 4.0 Partwise//EN" "http://www.musicxml.org/dtds/partwise.dtd">';
    expect(titleOf(new TextEncoder().encode(xml('UTF-8', 'a').replace('?>', `?>${doctype}`)))).toBe('a');
  });
});

describe('readScoreText: names', () => {
  it('takes the movement’s title before the work’s, and the composer among the creators', () => {
    const head = '<work><work-title>Six Songs</work-title></work><movement-title>Evening</movement-title><identification><creator type="lyricist">L</creator><creator type="composer">C</creator></identification>';
    const score = mustRead(onePart(note('C4')).replace('<part-list>', `${head}<part-list>`));
    expect([score.title, score.work, score.composer]).toEqual(['Evening', 'Six Songs', 'C']);
  });

  it('takes title and composer from the credits where there is nothing else', () => {
    const credit = (type: string, words: string) => `<credit><credit-type>${type}</credit-type><credit-words>${words}</credit-words></credit>`;
    const score = mustRead(onePart(note('C4')).replace('<part-list>', `${credit('title', 'Song')}${credit('composer', 'N. N.')}<part-list>`));
    expect([score.title, score.composer]).toEqual(['Song', 'N. N.']);
  });
});

describe('readScoreText: time', () => {
  it('reads divisions that change in mid-part exactly', () => {
    const xml = onePart(
      attributes('<divisions>1</divisions>') + note('C4', { duration: 2 }) + attributes('<divisions>3</divisions>') + note('D4', { duration: 1 }) + note('E4', { duration: 2 }) + note('F4', { duration: 3 }),
      attributes('<divisions>7</divisions>') + note('G4', { duration: 28 }),
    );
    expect(notesText(mustRead(xml))).toBe('C4@0:2 D4@2:1/3 E4@7/3:2/3 F4@3:1 G4@4:4');
  });

  it('reads decimal durations exactly', () => {
    expect(notesText(mustRead(onePart(note('C4', { duration: 0.5 }) + note('D4', { duration: 3.5 }))))).toBe('C4@0:1/2 D4@1/2:7/2');
  });

  it('reads several voices and staves by backup and forward', () => {
    const xml = onePart(
      attributes('<divisions>1</divisions><staves>2</staves>') +
        note('C5', { duration: 4, staff: 1 }) + backup(4) + forward(1) + note('E4', { duration: 3, voice: '2', staff: 1 }) + backup(4) + note('C3', { duration: 4, voice: '5', staff: 2 }),
    );
    const score = mustRead(xml);
    expect(notesText(score)).toBe('C5@0:4 C3@0:4 E4@1:3');
    expect(score.notes.map(({ voice, staff }) => `${voice}/${staff}`)).toEqual(['1/1', '5/2', '2/1']);
    expect(score.parts[0]?.staves).toBe(2);
  });

  it('gives a cross-staff note the staff it is written on', () => {
    const xml = onePart(attributes('<staves>2</staves>') + note('C3', { voice: '5', staff: 2 }) + note('C5', { voice: '5', staff: 1 }));
    expect(mustRead(xml).notes.map(({ staff }) => staff)).toEqual([2, 1]);
  });

  it('starts the notes of a chord together, each with its own length', () => {
    const xml = onePart(note('C4', { duration: 4 }) + note('E4', { duration: 2, chord: true }) + note('G4', { duration: 1, chord: true }));
    expect(notesText(mustRead(xml))).toBe('C4@0:4 E4@0:2 G4@0:1');
  });

  it('keeps a chord together over a direction that stands between', () => {
    const xml = onePart(note('C4', { duration: 2 }) + '<direction><direction-type><words>dolce</words></direction-type></direction>' + note('E4', { duration: 2, chord: true }) + note('D4', { duration: 2 }));
    expect(notesText(mustRead(xml))).toBe('C4@0:2 E4@0:2 D4@2:2');
  });

  it('reads tuplets and nested tuplets by their durations', () => {
    const xml = onePart(
      attributes('<divisions>15</divisions>') + note('C4', { duration: 10, after: tuplet }) + note('D4', { duration: 10, after: tuplet }) + note('E4', { duration: 2, after: tuplet }) + note('F4', { duration: 8, after: tuplet }),
    );
    expect(notesText(mustRead(xml))).toBe('C4@0:2/3 D4@2/3:2/3 E4@4/3:2/15 F4@22/15:8/15');
  });

  it('takes a bar whose rounded tuplets miss its metre by a hair for full', () => {
    const xml = onePart(attributes(`<divisions>480</divisions>${time('2', 4)}`) + [137, 137, 137, 137, 137, 137, 137].map((duration) => note('C4', { duration })).join(''), note('D4', { duration: 960 }));
    const score = mustRead(xml);
    expect(barsText(score)).toBe('1:2 2:2');
    expect(quarters(score, (score.notes[6]?.start ?? 0) + (score.notes[6]?.duration ?? 0))).toBe('2');
  });
});

describe('readScoreText: ties', () => {
  it.each([['tie', tie], ['tied alone', tied]])('merges notes tied by %s, over a barline', (_, mark) => {
    const score = mustRead(onePart(note('C4', { duration: 4, after: mark('start') }), note('C4', { duration: 2, after: mark('stop') }) + note('C4', { duration: 2 })));
    expect(notesText(score)).toBe('C4@0:6 C4@6:2');
    expect(score.notes[0]?.attacks.map((at) => quarters(score, at))).toEqual(['0', '4']);
  });

  it('merges a chain of ties', () => {
    const chain = note('C4', { after: tie('start') }) + note('C4', { after: tie('stop') + tie('start') }) + note('C4', { duration: 2, after: tie('stop') });
    expect(notesText(mustRead(onePart(chain)))).toBe('C4@0:4');
  });

  it('merges each note of a chord with its own', () => {
    const xml = onePart(
      note('C4', { duration: 2, after: tie('start') }) + note('E4', { duration: 2, chord: true }) + note('C4', { duration: 2, after: tie('stop') }) + note('F4', { duration: 2, chord: true }),
    );
    expect(notesText(mustRead(xml))).toBe('C4@0:4 E4@0:2 F4@2:2');
  });

  it('lets a let-ring tie go nowhere', () => {
    expect(notesText(mustRead(onePart(note('C4', { duration: 2, after: tied('let-ring') }) + note('C4', { duration: 2 }))))).toBe('C4@0:2 C4@2:2');
  });

  it('does not join a tie whose second note is missing or another pitch', () => {
    expect(notesText(mustRead(onePart(note('C4', { duration: 2, after: tie('start') }) + note('D4', { duration: 2, after: tie('stop') }))))).toBe('C4@0:2 D4@2:2');
  });

  it('keeps enharmonically tied notes apart, since spelling counts', () => {
    expect(notesText(mustRead(onePart(note('G#4', { duration: 2, after: tie('start') }) + note('Ab4', { duration: 2, after: tie('stop') }))))).toBe('G#4@0:2 Ab4@2:2');
  });

  it('holds the notes of a broken chord that is tied into a full one', () => {
    const xml = onePart(
      note('C4', { after: tie('start') }) + note('E4', { after: tie('start') }) + note('C4', { duration: 2, after: tie('stop') }) + note('E4', { duration: 2, chord: true, after: tie('stop') }),
    );
    expect(notesText(mustRead(xml))).toBe('C4@0:4 E4@1:3');
  });

  it('does not hold a note that was struck again meanwhile', () => {
    const xml = onePart(note('C4', { after: tie('start') }) + note('D4') + note('C4') + note('D4'), note('C4', { duration: 4, after: tie('stop') }));
    expect(notesText(mustRead(xml))).toBe('C4@0:1 D4@1:1 C4@2:1 D4@3:1 C4@4:4');
  });
});

describe('readScoreText: notes that do not sound as written', () => {
  it('attaches grace notes to the next note of their voice and lets them take no time', () => {
    const score = mustRead(onePart(note('D5', { before: '<grace/>' }) + note('E5', { before: '<grace slash="yes"/>' }) + note('C5', { duration: 4 }) + note('D5', { before: '<grace/>' })));
    expect(notesText(score)).toBe('C5@0:4');
    expect(score.graceNotes.map(({ pitch, mainNote }) => [pitchText(pitch), mainNote])).toEqual([['D5', 0], ['E5', 0], ['D5', null]]);
  });

  it('leaves out cue notes and unpitched notes, but counts their time', () => {
    const unpitched = '<note><unpitched><display-step>E</display-step><display-octave>4</display-octave></unpitched><duration>1</duration></note>';
    expect(notesText(mustRead(onePart(note('C4', { before: '<cue/>' }) + unpitched + note('D4', { duration: 2 }))))).toBe('D4@2:2');
  });

  it('lets tremolo, trill, turn and arpeggio notes sound as their written pitch', () => {
    const ornaments = ['<ornaments><tremolo type="single">3</tremolo></ornaments>', '<ornaments><tremolo type="unmeasured">0</tremolo></ornaments>', '<ornaments><trill-mark/></ornaments>', '<ornaments><turn/></ornaments>'];
    expect(notesText(mustRead(onePart(ornaments.map((mark) => note('C4', { after: `<notations>${mark}</notations>` })).join(''))))).toBe('C4@0:1 C4@1:1 C4@2:1 C4@3:1');
  });

  it('lets both pitches of a tremolo between two notes sound', () => {
    const mark = (type: string) => `<notations><ornaments><tremolo type="${type}">3</tremolo></ornaments></notations>`;
    expect(notesText(mustRead(onePart(note('C4', { duration: 2, after: mark('start') }) + note('E4', { duration: 2, after: mark('stop') }))))).toBe('C4@0:2 E4@2:2');
  });

  it('takes pitches under an octave shift as sounding already', () => {
    const shift = (type: string) => `<direction><direction-type><octave-shift type="${type}" size="8"/></direction-type></direction>`;
    expect(notesText(mustRead(onePart(shift('down') + note('C6', { duration: 4 }) + shift('stop'))))).toBe('C6@0:4');
  });

  it('reads double accidentals', () => {
    expect(notesText(mustRead(onePart(note('F##4', { duration: 2 }) + note('Bbb4', { duration: 2 }))))).toBe('F##4@0:2 Bbb4@2:2');
  });

  it('rounds microtones to the semitone nearer the natural and warns', () => {
    const alter = (value: string) => note('C#4').replace('<alter>1</alter>', `<alter>${value}</alter>`);
    const score = mustRead(onePart(alter('0.5') + alter('1.5') + alter('-0.5') + alter('0.75')));
    expect(notesText(score)).toBe('C4@0:1 C#4@1:1 C4@2:1 C#4@3:1');
    expect(score.warnings.map(({ code, bar }) => [code, bar])).toEqual([['microtone_rounded', 0]]);
  });
});

describe('readScoreText: transposing instruments sound at concert pitch, spelled by the interval', () => {
  const transpose = (diatonic: string, chromatic: number, more = '') => `<transpose>${diatonic && `<diatonic>${diatonic}</diatonic>`}<chromatic>${chromatic}</chromatic>${more}</transpose>`;
  const key = (fifths: number) => `<key><fifths>${fifths}</fifths></key>`;

  it.each([
    ['B flat clarinet', transpose('-1', -2), 'D5', 'C5'],
    ['A clarinet', transpose('-2', -3), 'Eb5', 'C5'],
    ['E flat clarinet', transpose('2', 3), 'A4', 'C5'],
    ['horn in F', transpose('-4', -7), 'F#4', 'B3'],
    ['double bass', transpose('0', 0, '<octave-change>-1</octave-change>'), 'C3', 'C2'],
    ['a horn without diatonic', transpose('', -7), 'G4', 'C4'],
  ])('%s', (_, element, written, sounding) => {
    expect(notesText(mustRead(onePart(attributes(element) + note(written, { duration: 4 }))))).toBe(`${sounding}@0:4`);
  });

  it('gives the key signature at concert pitch', () => {
    expect(mustRead(onePart(attributes(key(2) + transpose('-1', -2)) + note('D5'))).keySignatures[0]?.fifths).toBe(0);
  });

  it('follows a change of instrument', () => {
    const xml = onePart(attributes(transpose('2', 3)) + note('C4', { duration: 4 }), attributes(transpose('-1', -2)) + note('C4', { duration: 4 }));
    expect(notesText(mustRead(xml))).toBe('Eb4@0:4 Bb3@4:4');
  });

  it('leaves a score at concert pitch alone', () => {
    const xml = onePart(attributes(transpose('-1', -2)) + note('C4', { duration: 4 })).replace('<part-list>', '<defaults><concert-score/></defaults><part-list>');
    expect(notesText(mustRead(xml))).toBe('C4@0:4');
  });
});
