'use client';

import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { PlayList, StaffId } from './play-list';
import { type Player, createPlayer } from './player';
import { type PlayPlace, createPlayPlace } from './play-place';

export interface PlayControl {
  readonly playing: boolean;
  /** Where the music is; listened to by the cursor alone, so that the desk is not drawn anew at every note. */
  readonly place: PlayPlace;
  /** Null when it has begun; else why it has not. */
  play(list: PlayList): Promise<string | null>;
  stop(): void;
}

export interface PlaySettings {
  /** Quarter notes per minute. */
  readonly tempo: number;
  readonly loop: boolean;
  readonly muted: ReadonlySet<StaffId>;
}

/** One player for a page, which follows the settings while it plays and falls silent when the page is left. */
export function usePlayer(settings: PlaySettings): PlayControl {
  const [playing, setPlaying] = useState(false);
  const place = useMemo(() => createPlayPlace(), []);
  const player = useRef<Player | null>(null);
  const latest = useRef(settings);
  useEffect(() => {
    latest.current = settings;
  });
  useEffect(() => () => player.current?.stop(), []);

  const stop = useCallback(() => {
    player.current?.stop();
    place.set(null);
    setPlaying(false);
  }, [place]);

  const play = useCallback(
    async (list: PlayList) => {
      player.current ??= createPlayer();
      setPlaying(true);
      const over = () => {
        place.set(null);
        setPlaying(false);
      };
      try {
        await player.current.play(list, {
          tempo: () => latest.current.tempo,
          loops: () => latest.current.loop,
          hears: ({ staff }) => staff === null || !latest.current.muted.has(staff),
          onMoment: place.set,
          onEnd: over,
        });
        return null;
      } catch {
        over();
        return 'This browser makes no sound: its audio could not be started.';
      }
    },
    [place],
  );

  return { playing, place, play, stop };
}
