import { removeCircuit, type Circuit, type Lamp } from '#contracts/lamps.ts';
import { useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { MoveButtons } from '../parts/move-buttons.tsx';
import { useSetUpWrite } from '../parts/use-set-up-write.ts';
import { togetherOn } from './model/circuit-form.ts';

type CircuitCardProps = {
  circuit: Circuit;
  lamps: readonly Lamp[];
  /** Absent: looked at only. */
  act?:
    | {
        editCircuit: (id: string) => void;
        editLamp: (id: string) => void;
        retire: (lamp: Lamp) => void;
        move: (lamp: Lamp, by: -1 | 1) => void;
      }
    | undefined;
};

const kw = (kilowatts: number): string => `${Math.round(kilowatts * 100) / 100} kW`;

/** A circuit, its lamps and what may burn together. */
export function CircuitCard({ circuit, lamps, act }: CircuitCardProps) {
  const shop = useShop();
  const remove = useSetUpWrite(removeCircuit);
  return (
    <section aria-label={circuit.name} className="card flex flex-col">
      <header className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 px-4 py-3">
        <h2 className="flex flex-wrap items-baseline gap-x-3">
          {circuit.name}
          <span className="text-sm font-normal text-muted">{sayCircuit(circuit)}</span>
        </h2>
        {act && (
          <span className="whitespace-nowrap">
            <Button size="small" look="quiet" onClick={() => act.editCircuit(circuit.id)}>
              Change <span className="sr-only">{circuit.name}</span>
            </Button>
            {lamps.length === 0 && (
              <Button
                size="small"
                look="quiet"
                busy={remove.isPending}
                onClick={() =>
                  remove.mutate({
                    params: { shopId: shop.id, circuitId: circuit.id },
                    body: { version: circuit.version },
                  })
                }
              >
                Remove <span className="sr-only">{circuit.name}</span>
              </Button>
            )}
          </span>
        )}
      </header>
      {remove.isError && <ErrorNote error={remove.error} what={`${circuit.name} stays.`} className="mx-4 mb-3" />}
      <ul>
        {lamps.map((lamp) => (
          <li
            key={lamp.id}
            className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 border-t border-line px-4 py-1.5"
          >
            <p className="min-w-0">
              <b>{lamp.name}</b>{' '}
              <span className="text-muted">
                {kw(lamp.kilowatts)}, {lamp.wave} wave
              </span>
            </p>
            {act && (
              <span className="inline-flex items-center whitespace-nowrap">
                <MoveButtons
                  name={lamp.name}
                  isFirst={lamps[0]?.id === lamp.id}
                  isLast={lamps.at(-1)?.id === lamp.id}
                  onMove={(by) => act.move(lamp, by)}
                />
                <Button size="small" look="quiet" onClick={() => act.editLamp(lamp.id)}>
                  Change <span className="sr-only">{lamp.name}</span>
                </Button>
                <Button size="small" look="quiet" onClick={() => act.retire(lamp)}>
                  Retire <span className="sr-only">{lamp.name}</span>
                </Button>
              </span>
            )}
          </li>
        ))}
      </ul>
      <footer className="border-t border-line px-4 py-3">
        <RunsTogether circuit={circuit} lamps={lamps} />
      </footer>
    </section>
  );
}

function sayCircuit({ kilowatts, volts, phases, breakerAmperes }: Circuit): string {
  const supply = volts === null ? '' : `, ${volts} V ${phases === 3 ? 'three phases' : 'one phase'}`;
  return `${kw(kilowatts)}${supply}${breakerAmperes === null ? '' : `, ${breakerAmperes} A breaker`}`;
}

/** Which of its lamps may burn at once, and a bar of their kilowatts against the limit. */
function RunsTogether({ circuit, lamps }: { circuit: Circuit; lamps: readonly Lamp[] }) {
  if (lamps.length === 0) return <p className="text-muted">No lamp hangs on it.</p>;
  const { together, allFit, togetherKilowatts, allKilowatts, allAmperes } = togetherOn(circuit, lamps);
  const amperes = allAmperes === null ? '' : `, ${Math.round(allAmperes * 10) / 10} A`;
  return (
    <div className="flex flex-col gap-2">
      <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
        {allFit ? (
          <>
            <Badge tone="moss">all together</Badge>
            <span>
              All {lamps.length === 1 ? 'of it' : lamps.length} may burn at once: {kw(allKilowatts)}
              {amperes}.
            </span>
          </>
        ) : (
          <>
            <Badge tone="amber">not all</Badge>
            <span>
              {together.length === 0
                ? 'None of them may burn: each asks for more than the limit.'
                : `${together.length} of ${lamps.length} at once, such as ${together.join(' and ')}: ${kw(togetherKilowatts)}.`}{' '}
              All of them would be {kw(allKilowatts)}
              {amperes}.
            </span>
          </>
        )}
      </p>
      <svg
        role="img"
        aria-label={`${kw(allKilowatts)} of lamps against a limit of ${kw(circuit.kilowatts)}`}
        viewBox="0 0 100 6"
        preserveAspectRatio="none"
        className="h-2 w-full"
      >
        <Bars circuit={circuit} lamps={lamps} />
      </svg>
    </div>
  );
}

function Bars({ circuit, lamps }: { circuit: Circuit; lamps: readonly Lamp[] }) {
  const total = lamps.reduce((sum, lamp) => sum + lamp.kilowatts, 0);
  const whole = Math.max(total, circuit.kilowatts);
  const sizes = lamps.map((lamp) => lamp.kilowatts).toSorted((a, b) => a - b);
  const starts = sizes.map((_, i) => sizes.slice(0, i).reduce((sum, size) => sum + size, 0));
  return (
    <>
      <rect x={0} y={0} width={(circuit.kilowatts / whole) * 100} height={6} className="fill-line" />
      {sizes.map((size, i) => {
        const start = starts[i] ?? 0;
        const fits = start + size <= circuit.kilowatts + 1e-9;
        return (
          <rect
            key={i}
            x={(start / whole) * 100 + 0.2}
            y={fits ? 0 : 1.5}
            width={Math.max(0.5, (size / whole) * 100 - 0.4)}
            height={fits ? 6 : 3}
            className={fits ? 'fill-ember' : 'fill-crimson'}
          />
        );
      })}
    </>
  );
}
