import { fieldOf, type SheetForm } from './sheet-form.ts';

/** What the server found wrong, by the form's fields: `body.sheet.bake` shows at the bake's temperature. */
export function sentFaults(
  fields: readonly { path: string; message: string }[],
): Partial<Record<keyof SheetForm, string>> {
  const faults: Partial<Record<keyof SheetForm, string>> = {};
  for (const { path, message } of fields) {
    const [, part, line] = path.split('.');
    const field =
      part === 'name'
        ? 'name'
        : line !== undefined && line in fieldOf
          ? fieldOf[line as keyof typeof fieldOf]
          : undefined;
    if (field) faults[field] ??= `${message.charAt(0).toUpperCase()}${message.slice(1)}.`;
  }
  return faults;
}
