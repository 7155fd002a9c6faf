import { Shell } from './shell.tsx';

/** Dense, for the desk. */
export const DeskShell = () => <Shell place="desk" />;
