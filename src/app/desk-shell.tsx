import { Shell } from './shell.tsx';

/** Dense, for the desk. */
export const Component = () => <Shell place="desk" />;
