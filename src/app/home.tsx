import { Navigate } from 'react-router-dom';
import { useShop } from '#src/lib/session.ts';
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
    case 'owner':
      return <Navigate to={paths.day()} replace />;
  }
}
