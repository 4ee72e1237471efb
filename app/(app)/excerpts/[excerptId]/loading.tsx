import { Skeleton } from '@/components/ui';

export default function LoadingExcerpt() {
  return (
    <div role="status" className="sheet pt-8 pb-16">
      <span className="sr-only">Loading the excerpt</span>
      <Skeleton className="mb-3 h-5 w-40" />
      <Skeleton className="mb-8 h-10 w-2/3" />
      <Skeleton className="h-96" />
    </div>
  );
}
