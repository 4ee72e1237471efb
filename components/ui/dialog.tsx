'use client';

import { AlertDialog as Alert, Dialog as Modal } from 'radix-ui';
import { type ReactNode, useState } from 'react';
import { Button, type ButtonKind } from './button';
import { classNames } from './class-names';

const OVERLAY = 'fixed inset-0 z-40 bg-ink/35';
const FRAME =
  'plate fixed inset-x-4 top-[max(1rem,8dvh)] z-50 mx-auto flex max-h-[84dvh] flex-col overflow-y-auto bg-sheet text-ink outline-offset-[-5px] p-6 sm:p-8';

interface DialogProps {
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
  readonly title: ReactNode;
  readonly description?: ReactNode;
  readonly wide?: boolean;
  readonly children: ReactNode;
}

/** A modal sheet: focus is held inside, Escape closes, focus goes back to where it was. */
export function Dialog({ open, onOpenChange, title, description, wide = false, children }: DialogProps) {
  return (
    <Modal.Root open={open} onOpenChange={onOpenChange}>
      <Modal.Portal>
        <Modal.Overlay className={OVERLAY} />
        <Modal.Content className={classNames(FRAME, wide ? 'max-w-4xl' : 'max-w-xl')} {...(description ? {} : { 'aria-describedby': undefined })}>
          <div className="mb-4 flex items-start justify-between gap-4">
            <Modal.Title className="text-title">{title}</Modal.Title>
            <Modal.Close className="caps min-h-6 shrink-0 px-1 text-small text-ink-soft hover:text-ink">Close</Modal.Close>
          </div>
          {description ? <Modal.Description className="mb-4 text-ink-soft">{description}</Modal.Description> : null}
          {children}
        </Modal.Content>
      </Modal.Portal>
    </Modal.Root>
  );
}

/** The row of buttons at a dialog's foot. */
export function DialogActions({ children }: { readonly children: ReactNode }) {
  return <div className="mt-6 flex flex-wrap items-center justify-end gap-2">{children}</div>;
}

interface ConfirmProps {
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
  readonly title: ReactNode;
  /** What will happen, and whether it can be taken back. */
  readonly description: ReactNode;
  /** The verb: `Delete the score`, never `OK`. */
  readonly confirm: string;
  readonly kind?: ButtonKind;
  readonly onConfirm: () => Promise<void> | void;
}

/** Asks before something that cannot be taken back. Stays open, busy, until `onConfirm` is done. */
export function Confirm({ open, onOpenChange, title, description, confirm, kind = 'danger', onConfirm }: ConfirmProps) {
  const [busy, setBusy] = useState(false);
  const run = async () => {
    setBusy(true);
    try {
      await onConfirm();
    } finally {
      setBusy(false);
    }
  };
  return (
    <Alert.Root open={open} onOpenChange={busy ? () => undefined : onOpenChange}>
      <Alert.Portal>
        <Alert.Overlay className={OVERLAY} />
        <Alert.Content className={classNames(FRAME, 'max-w-lg')}>
          <Alert.Title className="mb-3 text-title">{title}</Alert.Title>
          <Alert.Description asChild>
            <div className="text-ink-soft">{description}</div>
          </Alert.Description>
          <DialogActions>
            <Alert.Cancel asChild>
              <Button>Keep it</Button>
            </Alert.Cancel>
            <Button kind={kind} busy={busy} onClick={() => void run()}>{confirm}</Button>
          </DialogActions>
        </Alert.Content>
      </Alert.Portal>
    </Alert.Root>
  );
}
