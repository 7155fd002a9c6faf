import { Caution } from '#src/ui/caution.tsx';

/** Stands where a heat limit is shown or entered. */
export const HeatCaution = () => (
  <Caution quiet>
    Take the figures from the vehicle maker&rsquo;s own instructions. They, the paint maker&rsquo;s data sheet, local
    rules and the licensed people responsible come first; where in doubt, no heat.
  </Caution>
);
