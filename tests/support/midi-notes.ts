/** A note of a Standard MIDI File: times in quarters from the start, as fractions of `perQuarter`. */
export interface MidiNotes {
  readonly perQuarter: number;
  /** `[tick, key]` of every note-on and every note-off, sorted. */
  readonly on: readonly (readonly [tick: number, key: number])[];
  readonly off: readonly (readonly [tick: number, key: number])[];
}

/** Reads the notes of a Standard MIDI File with a division in ticks per quarter. Source of the format: Standard MIDI Files 1.0 (from memory). */
export function readMidi(bytes: Uint8Array): MidiNotes {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const on: [number, number][] = [];
  const off: [number, number][] = [];
  let at = 8 + view.getUint32(4);
  while (at < bytes.length) {
    const end = at + 8 + view.getUint32(at + 4);
    readTrack(bytes.subarray(at + 8, end), on, off);
    at = end;
  }
  const inTime = (a: [number, number], b: [number, number]) => a[0] - b[0] || a[1] - b[1];
  return { perQuarter: view.getUint16(12), on: on.sort(inTime), off: off.sort(inTime) };
}

function readTrack(track: Uint8Array, on: [number, number][], off: [number, number][]): void {
  let at = 0;
  let tick = 0;
  let status = 0;
  const byte = () => track[at++] as number;
  const variable = () => {
    let value = 0;
    for (let b = byte(); ; b = byte()) {
      value = value * 128 + (b & 0x7f);
      if (b < 0x80) return value;
    }
  };
  while (at < track.length) {
    tick += variable();
    if ((track[at] as number) >= 0x80) status = byte();
    if (status === 0xff) byte();
    if (status >= 0xf0) {
      const length = variable();
      at += length;
      continue;
    }
    const first = byte();
    const second = (status & 0xe0) === 0xc0 ? 0 : byte();
    if ((status & 0xf0) === 0x90 && second > 0) on.push([tick, first]);
    else if ((status & 0xe0) === 0x80) off.push([tick, first]);
  }
}
