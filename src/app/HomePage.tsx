import { Navigate } from 'react-router-dom';
import { useSession } from './session.queries.ts';
import { firstPathOf } from './places.ts';

/** The role decides the first screen. */
export function HomePage() {
  return <Navigate to={firstPathOf(useSession().role)} replace />;
}
