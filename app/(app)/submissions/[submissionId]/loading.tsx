import { Spinner } from '@/components/ui';

export default function SubmissionLoading() {
  return (
    <p role="status" className="flex h-96 items-center justify-center gap-2 text-ink-soft">
      <Spinner label="" /> Opening the desk
    </p>
  );
}
