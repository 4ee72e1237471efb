import { Skeleton } from '@/components/ui';

export default function LoadingScore() {
  return (
    <div role="status" className="sheet pt-8 pb-16">
      <span className="sr-only">Loading the score</span>
      <Skeleton className="mb-3 h-5 w-40" />
      <Skeleton className="mb-8 h-10 w-2/3" />
      <Skeleton className="h-96" />
    </div>
  );
}
