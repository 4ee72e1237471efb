'use client';

import { useId } from 'react';
import { Button, ShapeIcon } from '@/components/ui';
import { type StaffId, staffOf } from '@/components/sound/play-list';
import type { Score } from '@/lib/score/score';
import { type DeskContext, runCommand } from './commands';
import type { Sound } from './use-sound';

interface SoundStripProps {
  readonly context: DeskContext;
  readonly score: Score;
  readonly sound: Sound;
}

const SLOWEST = 24;
const FASTEST = 200;

/** What is to be played and how: shown once something was played or asked for. */
export function SoundStrip({ context, score, sound }: SoundStripProps) {
  const tempoId = useId();
  const staves = stavesOf(score);
  if (!sound.shown) return null;
  return (
    <section aria-label="Sound" className="flex flex-wrap items-center gap-x-4 gap-y-1 border-t border-rule-strong bg-paper px-3 py-1.5 text-small">
      <span className="flex flex-wrap items-center gap-1">
        {sound.playing ? (
          <Button size="small" kind="primary" onClick={sound.stop}>Stop</Button>
        ) : (
          <Button size="small" kind="primary" onClick={() => sound.play('from-here')}>From here</Button>
        )}
        <Button size="small" onClick={() => runCommand(context, 'play-span')}>Selection</Button>
        <Button size="small" onClick={() => runCommand(context, 'play-chord')}>Chord</Button>
        <Button size="small" onClick={() => runCommand(context, 'play-reduction')}>Reduction</Button>
      </span>
      <label className="flex min-h-6 items-center gap-1.5">
        <input type="checkbox" className="size-4 accent-ink" checked={sound.loop} onChange={(event) => sound.setLoop(event.target.checked)} />
        Again and again
      </label>
      <span className="flex min-h-6 items-center gap-1.5">
        <label htmlFor={tempoId}>Quarters a minute</label>
        <input id={tempoId} type="range" className="h-6 w-28 accent-ink" min={SLOWEST} max={FASTEST} step={2} value={sound.tempo} onChange={(event) => sound.setTempo(Number(event.target.value))} />
        <span className="tabular w-8">{sound.tempo}</span>
      </span>
      {staves.length > 1 ? (
        <fieldset className="flex flex-wrap items-center gap-x-3">
          <legend className="sr-only">Staves to be heard</legend>
          {staves.map(({ id, name }) => (
            <label key={id} className="flex min-h-6 items-center gap-1.5">
              <input type="checkbox" className="size-4 accent-ink" checked={!sound.muted.has(id)} onChange={(event) => sound.mute(id, !event.target.checked)} />
              {name}
            </label>
          ))}
        </fieldset>
      ) : null}
      <button type="button" className="ml-auto flex min-h-6 min-w-6 items-center justify-center" aria-label="Close the sound" onClick={() => {
        sound.stop();
        sound.show(false);
      }}>
        <ShapeIcon shape="cross" />
      </button>
    </section>
  );
}

function stavesOf(score: Score): { id: StaffId; name: string }[] {
  return score.parts.flatMap((part) =>
    Array.from({ length: part.staves }, (_, i) => ({
      id: staffOf({ part: part.index, staff: i + 1 }),
      name: nameStaff(part.name, i, part.staves, score.parts.length),
    })),
  );
}

const HANDS = ['upper staff', 'lower staff'] as const;

function nameStaff(part: string, index: number, staves: number, parts: number): string {
  const staff = staves === 1 ? '' : staves === 2 ? (HANDS[index] as string) : `staff ${index + 1}`;
  const name = part || (parts > 1 || staff === '' ? 'Part' : '');
  const words = [name, staff].filter(Boolean).join(', ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
