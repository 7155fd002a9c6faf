import { Shell } from './shell.tsx';

/** Large, for gloves and a phone in the bay. */
export const Component = () => <Shell place="bay" />;
