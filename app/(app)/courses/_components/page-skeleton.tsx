import { Skeleton, SkeletonRows } from '@/components/ui';

/**
 * Stands while a page's rows are fetched. Pages put it round what they load after they know that the thing is the
 * reader's to see: a loading.tsx would answer 200 before that is known.
 */
export function PageSkeleton() {
  return (
    <div className="sheet py-8">
      <Skeleton className="mb-8 h-10 w-64" />
      <SkeletonRows rows={5} />
    </div>
  );
}
