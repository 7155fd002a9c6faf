import { Skeleton } from '#src/ui/skeleton.tsx';

/** The shape of a page that is on its way. */
export function PageSkeleton() {
  return (
    <div role="status" className="flex flex-col gap-4 p-5">
      <span className="sr-only">Loading</span>
      <Skeleton className="h-7 w-56" />
      <Skeleton className="h-[60vh] w-full rounded" />
    </div>
  );
}
