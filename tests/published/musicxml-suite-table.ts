/**
 * What each file of the MusicXML test suite sounds like. Source: the files' own descriptions and the notes they print
 * (MusicXML test suite, MIT licence); pitches as they sound.
 *
 * Bars: lengths in quarters, `4x3` three of 4. Notes: one stream per voice, streams parted by ` / `, each from the start
 * of the piece: `C5` a quarter, `C5:1/2` an eighth, `C5x3` three of them, `C5+E5` a chord, `r` a rest. Tied notes are one.
 */
export const SUITE: Readonly<Record<string, readonly [bars: string, notes: string]>> = {
  '01a-Pitches-Pitches.xml': [
    '4x27 2',
    'G2 A2 B2 C3 D3 E3 F3 G3 A3 B3 C4 D4 E4 F4 G4 A4 B4 C5 D5 E5 F5 G5 A5 B5 C6 D6 E6 F6 G6 A6 B6 C7 G#2 A#2 B#2 C#3 D#3 E#3 F#3 G#3 A#3 B#3 C#4 ' +
      'D#4 E#4 F#4 G#4 A#4 B#4 C#5 D#5 E#5 F#5 G#5 A#5 B#5 C#6 D#6 E#6 F#6 G#6 A#6 B#6 C#7 Gb2 Ab2 Bb2 Cb3 Db3 Eb3 Fb3 Gb3 Ab3 Bb3 Cb4 Db4 Eb4 Fb4 ' +
      'Gb4 Ab4 Bb4 Cb5 Db5 Eb5 Fb5 Gb5 Ab5 Bb5 Cb6 Db6 Eb6 Fb6 Gb6 Ab6 Bb6 Cb7 E4 F4 G4 A4 B4 C5 D5 E5 C##5 Cbb5 C#5x4',
  ],
  '01b-Pitches-Intervals.xml': [
    '2x41',
    'C5x2 C#5 Cb5 Db5 B#4 D5 B4 D#5 Bb4 Eb5 A#4 E5 A4 E#5 Ab4 Fb5 G#4 F5 G4 F#5 Gb4 Gb5 F#4 G5 F4 G#5 Fb4 Ab5 E#4 A5 E4 A#5 Eb4 Bb5 D#4 B5 D4 B#5 ' +
      'Db4 Cb6 C#4 C6 C4 C#6 Cb4 Db6 B#3 D6 B3 D#6 Bb3 Eb6 A#3 E6 A3 E#6 Ab3 Fb6 G#3 F6 G3 F#6 Gb3 Gb6 F#3 G6 F3 G#6 Fb3 Ab6 E#3 A6 E3 A#6 Eb3 Bb6 ' +
      'D#3 B6 D3 B#6 Db3',
  ],
  '01c-Pitches-NoVoiceElement.xml': ['4', 'G4:4'],
  '01d-Pitches-Microtones.xml': ['4x2', 'Cb4 D4 E4 F#4 Cb5 D5 E5 F#5'],
  '01e-Pitches-EditorialCautionaryAccidentals.xml': ['4x4', 'Db4 Eb4 Fb4 Gb4 C#4 D#4 E#4 F#4 Dbb4 Ebb4 Fbb4 Gbb4 C##4 D##4 E##4 F##4'],
  '01ea-Pitches-Parenthesis-Changed-Accidentals.xml': ['4x6', 'C#4 D#4 E#4 F#4 D#4:4 E#4:4x4'],
  '01f-Pitches-ParenthesizedMicrotoneAccidentals.xml': ['4x4', 'D4x4 C#4x4 Db4x4 C#4x4'],
  '01g-Pitches-AllArrowAccidentals.musicxml': ['2x6', 'G4x12'],
  '01h-Pitches-TurkishPersian.musicxml': ['2x7', 'G4x14'],
  '02a-Rests-Durations.xml': ['4x6', ''],
  '02b-Rests-PitchedRests.xml': ['5', ''],
  '02c-Rests-MultiMeasureRests.xml': ['4x31', ''],
  '02d-Rests-Multimeasure-TimeSignatures.xml': ['4x2 3x3 2x2 4x3', 'r:29 C5:4'],
  '02e-Rests-NoType.xml': ['1 4', 'C5 A4:4 / r E3:4'],
  '03aa-Rhythm-Durations.xml': [
    '16 24 14',
    'C5:8 C5:4 C5:2 C5 C5:1/2 C5:1/4 C5:1/8 C5:1/16x2 C5:12 C5:6 C5:3 C5:3/2 C5:3/4 C5:3/8 C5:3/16 C5:3/32x2 C5:7 C5:7/2 C5:7/4 C5:7/8 C5:7/16 ' +
      'C5:7/32x2',
  ],
  '03ab-Rhythm-Durations.xml': ['16 1/8 24 3/8 28 7/8', 'C5:16 C5:1/16 C5:1/32x2 C5:24 C5:3/16 C5:3/32 C5:3/64x2 C5:28 C5:7/16 C5:7/32 C5:7/64x2'],
  '03b-Rhythm-Backup.xml': ['3', 'C4x2 / r A3x2'],
  '03c-Rhythm-DivisionChange.xml': ['4x2', 'C5x4 C5:2x2'],
  '03d-Rhythm-DottedDurations-Factors.xml': [
    '1/2x2 1x2 3x2 4x2 5/4x2 7/2x2 9/2x2 31/2x2 4',
    'C5:1/2 r:1/2 C5 r C5:3 r:3 C5:4 r:4 C5 C5:1/4 r:5/4 C5:7/2 r:7/2 C5:4 C5:1/2 r:9/2 C5:31/2 r:31/2 C5:4',
  ],
  '03e-Rhythm-SecondaryBeamBreaks.musicxml': [
    '4',
    'C4:1/8 D4:1/8 E4:1/8 F4:1/8 G4:1/8 A4:1/8 B4:1/8 C5:1/8 C4:1/8 D4:1/8 E4:1/8 F4:1/8 G4:1/8 A4:1/8 B4:1/8 C5:1/8 C4:1/8 D4:1/8 E4:1/8 F4:1/8 ' +
      'G4:1/8 A4:1/8 B4:1/8 C5:1/8 C4:1/8 D4:1/8 E4:1/8 F4:1/8 G4:1/8 A4:1/8 B4:1/8 C5:1/8',
  ],
  '11a-TimeSignatures.xml': ['4x3 6 2 3 4 5 3/2 3 6', 'C5:4x3 C5:6 C5:2 C5:3 C5:4 C5:5 C5:3/2 C5:3 C5:6'],
  '11c-TimeSignatures-CompoundSimple.xml': ['5/2 9', 'B4:1/2x5 A4:4 A4 A4:3 A4'],
  '11d-TimeSignatures-CompoundMultiple.xml': ['11/2 21/2', 'B4:1/2x5 B4x3 A4:8 A4:2 A4:1/2'],
  '11e-TimeSignatures-CompoundMixed.xml': ['11/2', 'B4:1/2x5 B4x3'],
  '11f-TimeSignatures-SymbolMeaning.xml': ['3/2 5/2x2', 'B4:3/2 B4:1/2 B4:2 B4:1/2 B4:2'],
  '11g-TimeSignatures-SingleNumber.xml': ['3/2', 'B4:1/2x3'],
  '11h-TimeSignatures-SenzaMisura.xml': ['3/2', 'B4:1/2x3'],
  '12aa-Clefs_Pitch_Traditional.xml': ['4x4', 'C4:4x4'],
  '12ab-Clefs-Percussion-NonTrad.xml': ['4x10', 'C4:4x10'],
  '12ac-Clefs-TAB-Switch.xml': ['4x3', 'C4:4x3'],
  '12ad-Clefs-Extreme-Octave.xml': ['4x6', 'C2:4x2 C6:4x2 C7:4 C1:4'],
  '12b-Clefs-NoKeyOrClef.xml': ['4x2', 'C4:4x2'],
  '13a-KeySignatures.xml': ['2x30', 'C4:2x30'],
  '13aa-KeySignatures-Extreme.xml': ['2x10', 'C4:2x10'],
  '13ab-KeySignatures-Cancel.xml': ['2x5', 'C4:2x5'],
  '13ac-KeySignatures-Octaves.xml': ['2x3', 'C4:2x3'],
  '13b-KeySignatures-ChurchModes.xml': ['1x9', 'G4x9'],
  '13c-KeySignatures-NonTraditional.xml': ['2x2', 'C4:2x2'],
  '13d-KeySignatures-Microtones.xml': ['2', 'C4:2'],
  '13e-KeySignatures-MidMeasure-Change.xml': ['4', 'G4x4'],
  '14a-StaffDetails-LineChanges.xml': ['4x3', 'D5:4x3 / G4:4 G4:2x4'],
  '21a-Chord-Basic.xml': ['2', 'A4+F4'],
  '21b-Chords-TwoNotes.xml': ['4x2', 'A4+F4x8'],
  '21c-Chords-ThreeNotesDuration.xml': ['4x2', 'F4+A4+C5:3/2 A4+G5:1/2 A4+F4+C5x2 A4+F4+E5 A4+F4+F5 A4+F4+D5:2'],
  '21d-Chords-SchubertStabatMater.xml': ['4x2', 'F4:4 F4+Ab4:3/2 F4+Ab4:1/2 G4+Bb4x2'],
  '21e-Chords-PickupMeasures.xml': ['1 2', 'C5 C5+A4+F4 C5+A4'],
  '21f-Chord-ElementInBetween.xml': ['4', 'A4+F#4+D4'],
  '21g-Chords-Tremolos.musicxml': ['4', 'F3+C4+G4+D5 A3+D4+G4+C5:1/2 B3+D4+F4+A4:1/2 F5+A5+B5+C6:1/2 G4+D5+A5'],
  '22a-Noteheads.xml': [
    '4x33',
    'A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 ' +
      'C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4:2x14 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A4 C5 A3 B3 C#4 ' +
      'D4 E4 F#4 G#4 A4 C5 D5 E5 F5 G5 A5 B5 C6',
  ],
  '22b-Staff-Notestyles.xml': ['4x3', 'A4x2 C5 A4 C5 A4 C5 C4 D4:2 G4:2'],
  '22c-Noteheads-Chords.xml': ['4', 'E5+C5+A4x4'],
  '22d-Parenthesized-Noteheads.xml': ['6', 'A4x2 A4+C5+E5x2'],
  '23a-Tuplets.xml': [
    '4x4',
    'C4:2/3 D4:2/3 E4:2/3 F4:2/3 G4:2/3 A4:2/3 B4:2/3 C5:2/3 D5:2/3 E5:1/2 F5:1/2 G5:1/2 A5:1/2 B5:1/4 C6:1/4x2 B5:1/4 A5:3/7 G5:3/7 F5:3/7 E5:3/7 ' +
      'D5:3/7 C5:3/7 B4:3/7 A4:1/3 G4:1/3 F4:1/3 E4:1/3 D4:1/3 C4:1/3 C4:2',
  ],
  '23b-Tuplets-Styles.xml': ['5x3 4', 'C5:1/3x45 C5:3/8x4 C5:3/34x17 C5:1/2x2'],
  '23c-Tuplet-Display-NonStandard.xml': ['4x5', 'C5:1/3x3 C5x3 C5:1/3x3 C5x3 C5:1/3x3 C5x3 C5:1/3x3 C5x3 C5:1/3x3 C5x3'],
  '23d-Tuplets-Nested.xml': ['2', 'B4:1/3x2 B4:2/15x5 B4:1/3x2'],
  '23e-Tuplets-Tremolo.xml': ['3x5', 'A4:1/3x9 G4x3 G4:2 G4 F4:1/3 A4:1/3x2 A4:2 G4:2 G4'],
  '23f-Tuplets-DurationButNoBracket.xml': [
    '4',
    'F4 G4 A4:2/3 B4:2/3 C5:2/3 / A2:1/2 B2:1/2 C3:1/3 D3:1/3 E3:1/3 A2:1/4 B2:1/4 C3:1/4 D3:1/4 E3:1/6 F3:1/6 G3:1/6 A3:1/6 B3:1/6 C4:1/6',
  ],
  '24a-GraceNotes.xml': ['4x3', 'C5x5 C5:2 C5:1/2x2 F4+C5 C5x3'],
  '24b-ChordAsGraceNote.xml': ['3', 'C5x2 A4+C5'],
  '24c-GraceNote-MeasureEnd.xml': ['4', 'E5:2x2'],
  '24d-AfterGrace.xml': ['4', 'E5:2x2'],
  '24e-GraceNote-StaffChange.xml': ['4', 'E5:2x2'],
  '24f-GraceNote-Slur.xml': ['4', 'E5:2x2'],
  '31a-Directions.xml': ['4x14', 'C4x50 r:2 C4x3'],
  '31c-MetronomeMarks.xml': ['4x3', 'C5x12'],
  '32a-Notations.xml': ['4x6', 'C5x5 C5+E5+G5x2 C5x17'],
  '32aa-Notations2_Ornaments.xml': ['4x4', 'C5x14'],
  '32ab-Notations3.xml': ['4x11', 'C5x10 C5:2 C5x29'],
  '32ac-Notations4.xml': ['4x2', 'C5x4 G4:2x2'],
  '32ae-Notations6.musicxml': ['4x2', 'C5x8'],
  '32b-Articulations-Texts.xml': ['4x3', 'F4:4 G4:4 F4:4'],
  '32c-MultipleNotationChildren.xml': ['3', 'A4x3'],
  '32d-Arpeggio.xml': ['7', 'C4+E5+G5x7'],
  '32e-Fermatas.musicxml': ['2x7', 'G4:2x7'],
  '33a-Spanners.xml': ['3x23', 'B4:2/3x3 r B4x16 r:2 B5x3 B2x3 B4x19 F5 r B4 C5 r B4 C4 r B4x4 D#5 r B4x2 r B4x2 r B4x3'],
  '33b-Spanners-Tie.xml': ['4x2', 'F4:8'],
  '33c-Spanners-Slurs.xml': ['4x2', 'G4 C5 A4 G4x2 C5 A4 G4'],
  '33d-Spanners-OctaveShifts.xml': ['4', 'A4:1/2 C5:1/2 A6:1/2 C3:1/2 B2:1/2 A5:1/2x2 B3:1/4 C4:1/4'],
  '33e-Spanners-OctaveShifts-InvalidSize.xml': ['6', 'A4:4 A7 C3'],
  '33f-Trill-EndingOnGraceNote.xml': ['3', 'E5 F#5:1/4 G5:1/4 A5:3/2'],
  '33g-Slur-ChordedNotes.xml': ['4', 'G4+C5+G5 A4+D5 G4+D5 C5'],
  '33h-Spanners-Glissando.xml': ['4x5', 'G4 F5 G4 F5 G4 F5 G4 F5 G4 F5 G4 F5 G4 F5 G4 F5 G4 F5 G4 F5'],
  '33i-Ties-NotEnded.xml': ['4x5', 'C5:4x3 C5:8'],
  '41a-MultiParts-Partorder.xml': ['4', 'C4 / E4 / G4 / B4'],
  '41b-MultiParts-MoreThan10.xml': ['4', ''],
  '41c-StaffGroups.xml': ['4', 'B5 / F4 / A4 / E5 / F4 / D5 / E4 / B4 / A3 / D3 / E3 / B1 / A4 / C4 / F4 / A4 / B2 / E3 / E3 / F3 / D5 / A2 / G4 / E3 / E5 / F4 / C4 / C3 / C2'],
  '41d-StaffGroups-Nested.xml': ['4x3', 'B4:4 A4:4 / A4:4x2 / A4:4x2 / F4:4 B4:4 / D5:4 F4:4'],
  '41e-StaffGroups-InstrumentNames-Linebroken.xml': ['4x23', 'B4:4x22'],
  '41f-StaffGroups-Overlapping.xml': ['4', ''],
  '41g-PartNoId.xml': ['4', ''],
  '41h-TooManyParts.xml': ['4', ''],
  '41i-PartNameDisplay-Override.xml': ['4x2', 'C4:4x2 / C4:4x2'],
  '42a-MultiVoice-TwoVoicesOnStaff-Lyrics.xml': ['4x3', 'E5:2 D5 B4 r D5 B3:3/2 C5:1/2 / C5:2 B4 G4 r B4 G3:3/2 A4:1/2'],
  '42b-MultiVoice-MidMeasureClefChange.xml': [
    '3x2',
    'F4:1/2 D4:1/2 B3:1/2 G3:1/2 F3 E5:1/2 C5:1/2 G4:1/2x2 F4 / r:1/2 G2:1/2x3 A2:1/4 G2:1/4 F#2:1/4 G2:1/4 C3+E3+G3+C4 r:3/2 G3:1/2',
  ],
  '43a-PianoStaff.xml': ['4', 'F4:4 / B2:4'],
  '43b-MultiStaff-DifferentKeys.xml': ['4', 'F4:4 / B2:4'],
  '43c-MultiStaff-DifferentKeysAfterBackup.xml': ['4', 'F4:4 / B2:4'],
  '43d-MultiStaff-StaffChange.xml': ['4x2', 'A3:1/2 E4:1/2 A3:1/2 E4:1/2 C5:1/2 E4:1/2 A3:1/2 B4:1/2 C3+E3+G3+C4:1/2 C4+E4+G4:1/2 C3+E3+G3+C4:1/2 G3+C4+E4+G4:1/2'],
  '43e-Multistaff-ClefDynamics.xml': ['4x4', 'C5 B4 A4 G4 A4 B4 C#5 D5x2 C#5 B4 A4 / A2 B2 C3 D3 F#4 G4 A4 B4 A4 B4 C#5 D5'],
  '45a-SimpleRepeat.xml': ['4x2', ''],
  '45b-RepeatWithAlternatives.xml': ['4x4', 'C5:4x4'],
  '45c-RepeatMultipleTimes.xml': ['4x8', ''],
  '45d-Repeats-Nested-Alternatives.xml': ['4x12', ''],
  '45e-Repeats-Nested-Alternatives.xml': ['4x10', ''],
  '45f-Repeats-InvalidEndings.xml': ['4x5', ''],
  '45g-Repeats-NotEnded.xml': ['4x2', 'C5:4x2'],
  '46a-Barlines.xml': ['4x13', ''],
  '46b-MidmeasureBarline.xml': ['4', 'C5 A4 F4 C5'],
  '46c-Midmeasure-Clef.xml': ['4 2x2 4', 'r:4 C5x8'],
  '46d-PickupMeasure-ImplicitMeasures.xml': ['3/2 2x2 3', 'E4 E4:1/2 F4 G4 A4 B4 C5 D5'],
  '46e-PickupMeasure-SecondVoiceStartsLater.xml': ['1 4', 'C5x2 A4 F4 C5 / r:2 C4'],
  '46f-IncompleteMeasures.xml': ['2 4 2 4', 'A4x12'],
  '46g-PickupMeasure-Chordnames-FiguredBass.xml': ['1 4', 'C5:1/2x2 C4x4'],
  '51b-Header-Quotes.xml': ['4', ''],
  '51c-MultipleRights.xml': ['4', ''],
  '51d-EmptyTitle.xml': ['4', ''],
  '52a-PageLayout.xml': ['4x3', ''],
  '52b-Breaks.xml': ['4x3', 'C5:4x3'],
  '61a-Lyrics.xml': ['4x3', 'A4x10 A4:2'],
  '61b-MultipleLyrics.xml': ['4x2', 'G4x8'],
  '61c-Lyrics-Pianostaff.xml': ['4', 'A4x4 / F3x4'],
  '61d-Lyrics-Melisma.xml': ['4x2', 'C5 A4+E5 C5 C5+E5 C5:2 C5 E5'],
  '61e-Lyrics-Chords.xml': ['4', 'E4+C5 A4+C5 E4+C5 A4+C5'],
  '61f-Lyrics-GracedNotes.xml': ['4x2', 'G4 C5x3 C5:2 C5x2'],
  '61g-Lyrics-NameNumber.xml': ['6', 'G4x6'],
  '61h-Lyrics-BeamsMelismata.xml': [
    '4x4',
    'C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 ' +
      'C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2',
  ],
  '61i-Lyrics-Chords.xml': ['1', 'E5+C5+A4'],
  '61j-Lyrics-Elisions.xml': ['4', 'C5x4'],
  '61k-Lyrics-SpannersExtenders.xml': ['4x3', 'C5x11'],
  '71a-Chordnames.xml': ['4x2', 'A4x8'],
  '71c-ChordsFrets.xml': ['4x2', 'A4x8'],
  '71d-ChordsFrets-Multistaff.xml': ['4', 'D5x4 / F4x4 / D3x4 / B2x4'],
  '71e-TabStaves.xml': [
    '4x2',
    'G3 E5 C4 E3 G#2+F#3+G3 D3 G#3 E4 / D#4 G#3 C3 r F#4 G3x2 F#2 / A#3 B2:1/2 A3:1/2 r:2 G#4 D4 G#2 D3 / B3:1/2 D3+D2+G2+A2+A2:1/2 r:3 D4 D3 A2 ' +
      'D2 / G2 E1 D2 A#2 A1x4 / D#4 D3 D4 r G3 G4x3 / C#4 C#3 A4 E4 D4 F3 G2 C3 / E6 B4 C4 E4 C4x4',
  ],
  '71f-AllChordTypes.xml': ['4x9 2', 'C4x32 C4:2 C4:1/2x2 r C4x2'],
  '71g-MultipleChordnames.xml': ['4', 'A4:2 G4:2'],
  '72a-TransposingInstruments.xml': ['4x2', 'C4 D4 E4 F4 G4 A4 B4 C5 / C4 D4 E4 F4 G4 A4 B4 C5 / C4 D4 E4 F4 G4 A4 B4 C5'],
  // The last but one goes up an augmented fourth and three octaves from a written F sharp: C, spelled B sharp.
  '72b-TransposingInstruments-Full.xml': ['4', 'C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / B#4:4 / C5:4'],
  '72c-TransposingInstruments-Change.xml': ['4x3', 'Eb4:4 Bb3:4x2'],
  '72d-TransposingInstruments-scorePitch.xml': ['4', 'C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / C5:4 / B#4:4 / C5:4'],
  '73a-Percussion.xml': ['4x2', 'E3:6 A2:2'],
  '74a-FiguredBass.xml': ['4', 'G4:1/2x2 G4:3/4 G4:1/4 G4x2'],
  '75a-AccordionRegistrations.xml': ['4x4', 'C4x16'],
  '90a-Compressed-MusicXML.mxl': ['4', 'C#4x4'],
  '99a-Sibelius5-IgnoreBeaming.xml': ['9/8', 'E6:1/8 F#6:1/8x2 F#6:1/2 G#6:1/8 B6:1/8'],
  '99b-Lyrics-BeamsMelismata-IgnoreBeams.xml': [
    '4x4',
    'C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 ' +
      'C5:1/2 G4:1/2 B4:1/2 r:1/2 C5:1/2 A4:1/2 C5:1/2 A4:1/2 C5:1/2 G4:1/2 B4:1/2',
  ],
  '99c-Wavy-Lines-No-Numbers.xml': ['3', 'C5x3'],
  '99d-AccordionInvalid.xml': ['4', 'C4x4'],
};

/** Files that are refused, with the place: broken beyond what could be guessed. */
export const REFUSED: Readonly<Record<string, { code: string; line: number; element?: string }>> = {
  // A backup of 384 where a quarter note has one division: 384 quarters back from the fourth.
  '11b-TimeSignatures-NoTime.xml': { code: 'bad_backup', line: 32, element: 'backup' },
  // The end tag of a measure is missing.
  '32ad-Notations5.musicxml': { code: 'xml_broken', line: 141 },
};

/** Key signatures in order (repetitions counted once), sharps positive; `m` for minor, `?` for no or another mode. */
export const KEYS: Readonly<Record<string, string>> = {
  '13a-KeySignatures.xml': '-7 -7m -6 -6m -5 -5m -4 -4m -3 -3m -2 -2m -1 -1m 0 0m 1 1m 2 2m 3 3m 4 4m 5 5m 6 6m 7 7m',
  '13aa-KeySignatures-Extreme.xml': '-11 -10 -9 -8 -7 7 8 9 10 11',
  '13b-KeySignatures-ChurchModes.xml': '2 2m 2?',
  '13c-KeySignatures-NonTraditional.xml': '',
  '13d-KeySignatures-Microtones.xml': '',
  '13e-KeySignatures-MidMeasure-Change.xml': '2? -2? 0? 7?',
  // Instruments print other signatures; the music is in C, in C, in B flat.
  '72a-TransposingInstruments.xml': '0',
  '72c-TransposingInstruments-Change.xml': '-2',
};

/** Order of playing by bar numbers from 1, from the descriptions (45f makes no sense by its own word and is left out). */
export const PLAYED: Readonly<Record<string, string>> = {
  '45a-SimpleRepeat.xml': '1 1 1 1 1 2',
  '45b-RepeatWithAlternatives.xml': '1 2 1 3 4',
  '45c-RepeatMultipleTimes.xml': '1 2 3 2 3 2 3 2 3 2 3 4 5 6 7 4 5 6 7 4 5 6 7 8',
  '45d-Repeats-Nested-Alternatives.xml': '1 2 1 3 4 5 1 6 7 8 9 1 10 1 11 12',
  '45e-Repeats-Nested-Alternatives.xml': '1 2 1 3 4 5 5 6 7 6 8 9 8 9 10',
  '45g-Repeats-NotEnded.xml': '1 2',
};

/** Bars outside the count and short bars, where a metre is written: how far into its metre each bar begins, in quarters. */
export const OFFSETS: Readonly<Record<string, string>> = {
  '21e-Chords-PickupMeasures.xml': '0 0',
  '46c-Midmeasure-Clef.xml': '0 0 2 0',
  '46d-PickupMeasure-ImplicitMeasures.xml': '5/2 0 2 0',
  '46g-PickupMeasure-Chordnames-FiguredBass.xml': '3 0',
};
