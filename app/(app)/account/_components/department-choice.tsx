'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Choices, Radio, useAnnouncer } from '@/components/ui';
import { workInDepartment } from '../actions';

interface DepartmentChoiceProps {
  readonly memberships: readonly { readonly departmentId: string; readonly departmentName: string; readonly role: string }[];
  readonly chosen: string;
}

export function DepartmentChoice({ memberships, chosen }: DepartmentChoiceProps) {
  const router = useRouter();
  const { announce, warn } = useAnnouncer();
  const [current, setCurrent] = useState(chosen);
  const choose = async (departmentId: string, name: string) => {
    setCurrent(departmentId);
    const outcome = await workInDepartment({ departmentId }).catch(() => null);
    if (!outcome?.ok) {
      setCurrent(chosen);
      return warn(outcome?.error.message ?? 'The server did not answer. Try again.');
    }
    announce(`You work in ${name} now.`);
    router.refresh();
  };
  return (
    <div className="mt-5">
      <Choices legend="Department you work in">
        {memberships.map(({ departmentId, departmentName, role }) => (
          <Radio
            key={departmentId}
            name="department"
            label={`${departmentName} (${role})`}
            checked={departmentId === current}
            onChange={() => void choose(departmentId, departmentName)}
          />
        ))}
      </Choices>
    </div>
  );
}
