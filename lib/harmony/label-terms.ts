/** Terms of a label over its span: what the key and the habit of the style say about the chord. */
export const LABEL_TERMS = [
  ['label-frequency', 'how common the numeral is'],
  ['inversion-frequency', 'how common the inversion is for this numeral'],
  ['out-of-scale-plain', 'foreign notes stand outside the scale'],
  ['out-of-scale-moving', 'foreign notes outside the scale move by step'],
  ['applied', 'it is an applied chord'],
  ['chromatic', 'it is a chromatic chord'],
  ['opens-on-tonic', 'the music opens with the tonic'],
  ['closes-on-tonic', 'the music closes with the tonic'],
  ['opens-in-home-key', 'the music opens in its home key'],
  ['closes-in-home-key', 'the music closes in its home key'],
  ['over-tonic-pedal', 'it stands over a held tonic'],
  ['over-dominant-pedal', 'it stands over a held dominant'],
] as const;

export type LabelTermName = (typeof LABEL_TERMS)[number][0];

export const HAND_LABEL_WEIGHTS: Readonly<Record<LabelTermName, number>> = {
  'label-frequency': 0.2,
  'inversion-frequency': 0.45,
  'out-of-scale-plain': -0.69,
  'out-of-scale-moving': -0.43,
  applied: 0,
  chromatic: -0.3,
  'opens-on-tonic': 0.6,
  'closes-on-tonic': 0.8,
  'opens-in-home-key': 0.5,
  'closes-in-home-key': 0.8,
  'over-tonic-pedal': 0.3,
  'over-dominant-pedal': 0.3,
};
