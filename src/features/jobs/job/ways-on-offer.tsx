import { Check } from 'lucide-react';
import type { Way } from '#contracts/sheets.ts';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { minutesOf } from '../model/sheet-stages.ts';

type WaysOnOfferProps = { ways: readonly Way[]; chosen: string | null; heatLimit: number | null };

/** The ways to do a stage, with how long each takes and how hot it gets; the planned one and those too hot are marked. */
export function WaysOnOffer({ ways, chosen, heatLimit }: WaysOnOfferProps) {
  const { duration, temperature } = useFormats();
  const isTooHot = (way: Way) => heatLimit !== null && way.bakeCelsius !== null && way.bakeCelsius > heatLimit;
  if (ways.length < 2 && !ways.some(isTooHot)) return null;
  return (
    <ul aria-label="Ways on offer" className="flex flex-wrap gap-1.5 pt-0.5 text-xs">
      {ways.map((way) => (
        <li
          key={way.id}
          className={cx(
            'figures flex items-center gap-1 rounded-sm border px-1.5 leading-6',
            way.id === chosen ? 'border-petrol bg-petrol-soft font-semibold text-petrol' : 'border-line text-muted',
          )}
        >
          {way.id === chosen && <Check size={12} aria-hidden="true" />}
          {way.label}, {duration(minutesOf(way))}
          {way.bakeCelsius !== null && `, ${temperature(way.bakeCelsius)}`}
          {isTooHot(way) && <b className="text-crimson">above the heat limit</b>}
          {way.id === chosen && <span className="sr-only">, planned</span>}
        </li>
      ))}
    </ul>
  );
}
