import { Plus } from 'lucide-react';
import { Link } from 'react-router-dom';
import { paths } from '#src/app/paths.ts';
import { Button } from '#src/ui/button.tsx';

export const NewJobButton = () => (
  <Button look="primary" asChild>
    <Link to={paths.newJob()}>
      <Plus size={16} aria-hidden="true" />
      New job
    </Link>
  </Button>
);
