import { useQuery } from '@tanstack/react-query';
import { useFormats, useShop } from '#src/lib/session.ts';
import { coatingsQuery } from './desk-queries.ts';
import type { Answer } from './model/reader.ts';
import { chosenCoating, sheetOf, typedSheet, type Sheet } from './model/sheet-of.ts';
import { useDesk } from './use-desk.ts';

/** The sheet the desk reckons with; null while the coatings are on their way. */
export function useSheet(): Answer<Sheet> | null {
  const { values } = useDesk();
  const { unit } = useFormats();
  const { data, isPending } = useQuery(coatingsQuery(useShop().id));
  if (isPending && values.coating !== typedSheet) return null;
  return sheetOf(chosenCoating(data?.coatings ?? [], values.coating), values, unit);
}
