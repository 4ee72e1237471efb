'use client';

import { Desk, type DeskRules } from '@/components/reading/desk';
import type { Reading } from '@/lib/harmony/reading';
import { type ConventionSheet, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';

interface PreviewDeskProps {
  readonly title: string;
  readonly keyReadingId: string;
  readonly userId: string;
  readonly reading: Reading;
  readonly conventions: ConventionSheet | null;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly rules: DeskRules;
}

export function PreviewDesk({ title, keyReadingId, conventions, ...desk }: PreviewDeskProps) {
  return (
    <Desk
      {...desk}
      base={null}
      scoreUrl={`/api/readings/${keyReadingId}/score`}
      mode="answer"
      version={0}
      sheet={conventions ?? DEFAULT_CONVENTIONS}
      heading={<span className="truncate font-book text-lead">{title}</span>}
    />
  );
}
