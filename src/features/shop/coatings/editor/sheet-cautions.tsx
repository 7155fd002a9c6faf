import { Caution } from '#src/ui/caution.tsx';

export const SheetCautions = () => (
  <Caution quiet>
    Planning aid only. The maker’s data sheet, local fire and environmental rules and your licensed people come first.
    Sprayed isocyanates need air-fed breathing equipment; nobody goes in during purge or bake. Vehicles with
    high-voltage batteries and plastic parts have lower heat limits than a coating’s own.
  </Caution>
);
