import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { Button } from '#src/ui/button.tsx';
import { DoorCard } from './door-card.tsx';

/** A letter's page without its token: reloaded, or the link was cut. */
export function NoToken({ title, next }: { title: string; next?: { to: string; label: string } }) {
  return (
    <DoorCard title={title}>
      <p>
        This page needs the link from your letter. Open the letter again and use the whole link; it is taken out of the
        address as soon as it was read.
      </p>
      <div className="flex flex-wrap gap-2">
        {next && (
          <Button asChild>
            <Link to={next.to}>{next.label}</Link>
          </Button>
        )}
        <Button asChild look="quiet">
          <Link to={paths.signIn()}>Go to sign-in</Link>
        </Button>
      </div>
    </DoorCard>
  );
}
