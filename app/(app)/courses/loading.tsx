import { Skeleton, SkeletonRows } from '@/components/ui';

export default function CoursesLoading() {
  return (
    <div className="sheet py-8">
      <Skeleton className="mb-8 h-10 w-64" />
      <SkeletonRows rows={5} />
    </div>
  );
}
