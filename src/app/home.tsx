import { useQuery } from '@tanstack/react-query';
import { Navigate } from 'react-router-dom';
import { firstStepsQuery } from '#src/features/shop/first-steps/first-steps-query.ts';
import { useShop } from '#src/lib/session.ts';
import { PageSkeleton } from './page-skeleton.tsx';
import { paths } from './paths.ts';

/** Everybody begins where their day happens. */
export function Component() {
  const { role } = useShop();
  switch (role) {
    case 'painter':
      return <Navigate to={paths.bench()} replace />;
    case 'office':
      return <Navigate to={paths.jobs()} replace />;
    case 'lead':
      return <Navigate to={paths.day()} replace />;
    case 'owner':
      return <OwnerHome />;
  }
}

/** A shop that has no plan yet is set up first. */
function OwnerHome() {
  const shop = useShop();
  const { data, isPending } = useQuery({ ...firstStepsQuery(shop.id), retry: false });
  if (isPending) return <PageSkeleton />;
  const isReady = data === undefined || data.steps.every(({ done }) => done);
  return <Navigate to={isReady ? paths.day() : paths.firstSteps()} replace />;
}
