'use client';

import { Tooltip as Parts } from 'radix-ui';
import type { ReactNode } from 'react';

/** Words on hover and focus for a control that already has a name; never the only place where something is said. */
export function Tooltip({ text, children }: { readonly text: ReactNode; readonly children: ReactNode }) {
  return (
    <Parts.Provider delayDuration={400}>
      <Parts.Root>
        <Parts.Trigger asChild>{children}</Parts.Trigger>
        <Parts.Portal>
          <Parts.Content sideOffset={6} collisionPadding={8} className="z-50 max-w-72 rounded-plate bg-ink px-2 py-1 text-small text-paper">
            {text}
          </Parts.Content>
        </Parts.Portal>
      </Parts.Root>
    </Parts.Provider>
  );
}
