import { useWidth } from './drawings/use-width.ts';
import type { CircuitAnswer, ShopCircuit } from './model/circuit.ts';
import { scale } from './model/plot-geometry.ts';
import { plainNumber } from './model/typed.ts';
import { Facts, Source, Verdict, Warnings } from './sections.tsx';

const amperes = (value: number) => `${plainNumber(value, 1)} A`;

export function CircuitResult({ answer, shop }: { answer: CircuitAnswer; shop: ShopCircuit | null }) {
  const { lamps, together, allFit } = answer;
  const names = together.map((place) => lamps[place]?.name ?? '').join(', ');
  return (
    <>
      <Verdict good={allFit}>
        {allFit
          ? `All ${lamps.length === 1 ? 'of it' : lamps.length} may burn at once`
          : together.length === 0
            ? 'None of them may burn on this circuit'
            : `${together.length} of ${lamps.length} may burn at once, such as ${names}`}
      </Verdict>
      <CircuitBar answer={answer} />
      <Facts
        rows={[
          ...lamps.map(
            ({ name, kilowatts }, i) =>
              [name, `${plainNumber(kilowatts, 1)} kW, ${amperes(answer.eachAmperes[i] ?? 0)}`] as const,
          ),
          ['All at once', `${plainNumber(answer.allKilowatts, 1)} kW, ${amperes(answer.allAmperes)}`],
          ['May be used', `${plainNumber(answer.usableKilowatts, 1)} kW, ${amperes(answer.usableAmperes)}`],
          [
            'Breaker that all would ask for',
            answer.breakerForAll === null ? 'larger than the usual series' : `${answer.breakerForAll} A`,
          ],
        ]}
      />
      <Warnings words={words(answer, shop)} />
      <Source>
        P/V and P/(√3 V), power factor 1; 80 % for three hours and more by NEC 210.20(A), or by habit. Breaker series
        from memory. A planning figure: cable, demand and local code are the licensed electrician&rsquo;s.
      </Source>
    </>
  );
}

function words({ continuous, usage }: CircuitAnswer, shop: ShopCircuit | null): string[] {
  return [
    ...(continuous ? ['Three hours and more is a continuous load: only 80 % of the breaker counts.'] : []),
    ...(shop && usage === 'eighty-percent'
      ? [
          `80 % of the ${plainNumber(shop.kilowatts, 1)} kW that the shop entered. Where that figure holds the 80 % already, take the tick away.`,
        ]
      : []),
  ];
}

/** The lamps end to end in amperes, against what may be used and against the breaker. */
function CircuitBar({ answer }: { answer: CircuitAnswer }) {
  const [ref, width] = useWidth();
  const { eachAmperes, together, usableAmperes, limitAmperes, allAmperes, usage } = answer;
  const toX = scale({ from: 0, to: Math.max(limitAmperes, allAmperes) * 1.04 }, { from: 2, to: width - 2 });
  // Those that run come first.
  const order = [...together, ...eachAmperes.map((_, place) => place).filter((place) => !together.includes(place))];
  const starts = order.map((_, i) => order.slice(0, i).reduce((sum, place) => sum + (eachAmperes[place] ?? 0), 0));
  const label = `${amperes(allAmperes)} for all lamps, ${amperes(usableAmperes)} may be used of ${amperes(limitAmperes)}`;
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <svg role="img" aria-label={label} width={width} height={78} className="figures block text-xs">
        {order.map((place, i) => {
          const from = toX(starts[i] ?? 0);
          const to = toX((starts[i] ?? 0) + (eachAmperes[place] ?? 0));
          const runs = together.includes(place);
          return (
            <g key={place}>
              <rect
                x={from}
                y={22}
                width={Math.max(2, to - from - 2)}
                height={24}
                rx={3}
                strokeDasharray={runs ? undefined : '4 3'}
                className={runs ? 'fill-ember stroke-ember' : 'fill-crimson-soft stroke-crimson'}
              />
              {to - from > 20 && (
                <text
                  x={(from + to) / 2 - 1}
                  y={38}
                  textAnchor="middle"
                  className={runs ? 'fill-on-ember font-bold' : 'fill-crimson font-bold'}
                >
                  {place + 1}
                </text>
              )}
            </g>
          );
        })}
        <Line at={toX(limitAmperes)} width={width} y={12} text={amperes(limitAmperes)} />
        {usage === 'eighty-percent' && (
          <Line at={toX(usableAmperes)} width={width} y={70} text={`80 %: ${amperes(usableAmperes)}`} />
        )}
      </svg>
    </div>
  );
}

function Line({ at, width, y, text }: { at: number; width: number; y: number; text: string }) {
  const half = text.length * 3.3;
  return (
    <g>
      <line x1={at} x2={at} y1={16} y2={y > 40 ? 58 : 52} className="stroke-ink" strokeWidth={2} />
      <text x={Math.min(Math.max(at, half), width - half)} y={y} textAnchor="middle" className="fill-ink font-semibold">
        {text}
      </text>
    </g>
  );
}
