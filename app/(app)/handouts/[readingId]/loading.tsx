import { Skeleton } from '@/components/ui';

export default function HandoutLoading() {
  return (
    <div className="sheet pt-10" role="status" aria-label="Loading the handout">
      <div className="grid gap-8 lg:grid-cols-[20rem_minmax(0,1fr)]">
        <Skeleton className="h-96" />
        <Skeleton className="aspect-[210/297] w-full max-w-3xl" />
      </div>
    </div>
  );
}
