import type { LampDistance } from '#chemistry/infrared/lamp-distance.ts';
import type { LimitSource } from '#chemistry/limits/strictest-limit.ts';
import { useFormats } from '#src/lib/session.ts';
import { Plot } from './drawings/plot.tsx';
import { PositionsDrawing } from './drawings/positions.tsx';
import { degrees, limitDegrees } from './model/finding-words.ts';
import type { LampAnswer } from './model/lamp.ts';
import { plainNumber, unitFromCelsius, type Unit } from './model/typed.ts';
import { Card, Facts, Headline, Source, Verdict, Warnings } from './sections.tsx';

const limitNames: Partial<Record<LimitSource, string>> = {
  'battery-recorded': 'the battery’s recorded limit',
  'battery-unrecorded': 'a battery whose limit nobody recorded',
};
const limitName = (setBy: LimitSource) => limitNames[setBy] ?? 'the part’s limit';

export function LampResult({ answer }: { answer: LampAnswer }) {
  const { unit } = useFormats();
  const { positions } = answer;
  return (
    <>
      <Card title={`Heat-up at ${plainNumber(answer.distance, 2)} m`}>
        <HeatUpFound answer={answer} />
      </Card>
      <Card title={`Distance for ${degrees(answer.wantedCelsius, unit)}`}>
        <Facts
          rows={[
            ['To come to rest there', distanceWords(answer.restDistance, unit)],
            [`To be there after ${plainNumber(answer.burnMinutes, 1)} min`, distanceWords(answer.timedDistance, unit)],
          ]}
        />
        <Warnings words={mustBePutOut(answer, unit)} />
        <Source>
          searched between 0.6 and 0.9 m, the usual distances from memory; the lamp maker&rsquo;s sheet decides.
        </Source>
      </Card>
      <Card title="Positions to cover the area">
        <Headline figure={positions.positions}>
          {positions.positions === 1 ? 'position' : `positions, ${positions.across} across and ${positions.down} down`}
          {positions.turned && ', lamp turned'}
        </Headline>
        <PositionsDrawing positions={positions} />
        <Source>neighbouring fields overlap by 0.1 m, since their edge is weaker (from memory).</Source>
      </Card>
    </>
  );
}

function HeatUpFound({ answer }: { answer: LampAnswer }) {
  const { unit } = useFormats();
  const { limit, heatUp, wantedCelsius, sheetMinutes } = answer;
  const wantedOver = wantedCelsius > limit.celsius;
  return (
    <>
      {wantedOver ? (
        <Verdict good={false}>
          Refused: {degrees(wantedCelsius, unit)} is above {limitName(limit.setBy)} of{' '}
          {limitDegrees(limit.celsius, unit)}.
        </Verdict>
      ) : (
        <Headline
          figure={answer.wantedAtMinute === null ? 'Not reached' : `${plainNumber(answer.wantedAtMinute, 1)} min`}
        >
          {answer.wantedAtMinute === null
            ? `${degrees(wantedCelsius, unit)} is not reached in this time`
            : `until the metal is at ${degrees(wantedCelsius, unit)}`}
        </Headline>
      )}
      {heatUp === 'room-too-warm' ? (
        <Verdict good={false}>The room is as warm as {limitName(limit.setBy)}: no lamp.</Verdict>
      ) : (
        <HeatUpPlot answer={answer} heatUp={heatUp} />
      )}
      <Warnings words={heatUpWarnings(answer, unit)} />
      <Facts
        rows={[
          ['Would come to rest at', degrees(answer.balanceCelsius, unit)],
          ['Limit', `${limitDegrees(limit.celsius, unit)}, ${limitName(limit.setBy)}`],
          ...(sheetMinutes
            ? ([
                [
                  'Lamp time of the sheet',
                  `${plainNumber(sheetMinutes.minutes, 1)} min at ${plainNumber(sheetMinutes.metres, 2)} m${sheetMinutes.printed ? '' : ', twice the short-wave time'}`,
                ],
              ] as const)
            : []),
        ]}
      />
      <Source>
        view factor of facing rectangles (Howell C-11), panel as one lump losing heat by Stefan-Boltzmann and
        convection; radiant share 0.85, absorptance and emissivity 0.9, 5 W/(m²K): from memory. It reckons the metal
        warm: safe for the part, not proof of a cure. Measure the metal.
      </Source>
    </>
  );
}

function HeatUpPlot({ answer, heatUp }: { answer: LampAnswer; heatUp: Exclude<LampAnswer['heatUp'], string> }) {
  const { unit } = useFormats();
  const { limit, wantedCelsius, burnMinutes } = answer;
  const at = (celsius: number) => unitFromCelsius(celsius, unit);
  const points = heatUp.trace.map(({ minutes, metalCelsius }) => ({ x: minutes, y: at(metalCelsius) }));
  const start = points[0]?.y ?? at(20);
  const last = heatUp.trace.at(-1);
  const top = Math.max(at(limit.celsius), ...points.map(({ y }) => y));
  return (
    <Plot
      label={`Metal temperature under the lamp: ${degrees(last?.metalCelsius ?? 0, unit)} after ${plainNumber(last?.minutes ?? 0, 1)} min; limit ${limitDegrees(limit.celsius, unit)}`}
      x={{ from: 0, to: burnMinutes }}
      y={{ from: start - (top - start) * 0.05, to: top + (top - start) * 0.12 }}
      xName="minutes"
      yName={`metal, °${unit}`}
      lines={[{ points, tone: 'ember' }]}
      levels={[
        { y: at(limit.celsius), tone: 'crimson', label: `limit ${limitDegrees(limit.celsius, unit)}` },
        ...(wantedCelsius < limit.celsius
          ? [
              {
                y: at(wantedCelsius),
                tone: 'moss' as const,
                label: `wanted ${degrees(wantedCelsius, unit)}`,
              },
            ]
          : []),
      ]}
    />
  );
}

function heatUpWarnings({ heatUp, limit, burnMinutes, distance }: LampAnswer, unit: Unit): string[] {
  const words: string[] = [];
  if (heatUp !== 'room-too-warm' && heatUp.outcome.code === 'limit-reached') {
    const minute = Math.floor(heatUp.outcome.atMinute * 10) / 10;
    words.push(
      `At this distance ${limitName(limit.setBy)} of ${limitDegrees(limit.celsius, unit)} is reached after ${plainNumber(minute, 1)} min. Refused for ${plainNumber(burnMinutes, 1)} min: move the lamp away, or put it out before.`,
    );
  }
  if (limit.minutes !== null && burnMinutes > limit.minutes) {
    words.push(
      `The battery bears at most ${limit.minutes} min of heat in all, earlier bakes included: take it out, or bake for less.`,
    );
  }
  if (limit.needsSupport) words.push('Plastic sags under its own weight at this heat: lay it on supports.');
  if (distance < 0.6 || distance > 0.9) words.push('Outside the usual 0.6 to 0.9 m: look into the lamp maker’s sheet.');
  return words;
}

function distanceWords(found: LampDistance, unit: Unit): string {
  switch (found.code) {
    case 'found':
      return `${plainNumber(Math.ceil(found.distanceMetres * 100 - 1e-6) / 100, 2)} m`;
    case 'above-limit':
      return `none: above the limit of ${limitDegrees(found.limitCelsius, unit)}`;
    case 'too-weak':
      return `too weak: ${degrees(found.metalCelsius, unit)} even at ${found.distanceMetres} m`;
    case 'too-strong':
      return `too strong: ${degrees(found.metalCelsius, unit)} even at ${found.distanceMetres} m`;
  }
}

function mustBePutOut({ timedDistance, limit }: LampAnswer, unit: Unit): string[] {
  if (timedDistance.code !== 'found' || !timedDistance.mustBePutOut) return [];
  return [
    `At that distance it would go on to ${degrees(timedDistance.restsAtCelsius, unit)}, above the limit of ${limitDegrees(limit.celsius, unit)}: put the lamp out in time, and stay with it.`,
  ];
}
