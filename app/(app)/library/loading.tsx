import { PageHeader, Skeleton, SkeletonRows } from '@/components/ui';

export default function LoadingLibrary() {
  return (
    <div className="sheet pb-16">
      <PageHeader title="Library" />
      <Skeleton className="mb-6 h-28" />
      <SkeletonRows rows={8} label="Loading the library" />
    </div>
  );
}
