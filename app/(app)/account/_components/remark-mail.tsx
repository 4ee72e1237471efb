'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Checkbox } from '@/components/ui';
import { saveRemarkMail } from '../actions';

/** The switch for mails about remarks. */
export function RemarkMail({ wanted }: { readonly wanted: boolean }) {
  const [checked, setChecked] = useState(wanted);
  const [, act] = useAct();
  const change = async (next: boolean) => {
    setChecked(next);
    await act(() => saveRemarkMail({ remarkMail: next }), next ? 'You get mail about remarks.' : 'No mail about remarks from now on.');
  };
  return (
    <Checkbox
      label="Remarks: when someone names you, answers you, or writes on a reading of yours"
      checked={checked}
      onChange={(event) => void change(event.target.checked)}
    />
  );
}
