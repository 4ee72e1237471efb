import { Spinner } from '@/components/ui';

export default function DeskLoading() {
  return (
    <div className="flex h-[calc(100dvh-var(--spacing-header))] flex-col">
      <div className="h-11 border-b border-rule-strong" />
      <p role="status" className="flex flex-1 items-center justify-center gap-2 text-ink-soft"><Spinner label="" /> Opening the desk</p>
    </div>
  );
}
