import { phaseWords } from '#src/lib/phase-words.ts';
import { Table, Td, Th } from '#src/ui/table.tsx';
import { doings, hoursText, shareText, type Figures } from './model/shares.ts';
import type { Group } from './report.tsx';

/** The figures that are drawn above, in hours. */
export function UseTable({ groups }: { groups: readonly Group[] }) {
  return (
    <Table label="Hours by place" className="break-inside-avoid print:overflow-visible print:text-xs">
      <thead>
        <tr>
          <Th className="left-0 z-20">Place</Th>
          {doings.map((doing) => (
            <Th key={doing} number>
              <span className="inline-block first-letter:uppercase">{phaseWords[doing]}</span>
            </Th>
          ))}
          <Th number>Open</Th>
          <Th number>Free</Th>
          <Th number>Used</Th>
          <Th number>Recorded</Th>
        </tr>
      </thead>
      {groups.map(({ kind, title, places, all }) => (
        <tbody key={kind}>
          {places.map(({ place, figures }) => (
            <Row key={place.placeId} name={place.name} figures={figures} />
          ))}
          {places.length > 1 && <Row name={`${title}, together`} figures={all} isSum />}
        </tbody>
      ))}
    </Table>
  );
}

type RowProps = { name: string; figures: Figures; isSum?: boolean };

function Row({ name, figures, isSum }: RowProps) {
  const { hours, open, free, share, recorded, bookings } = figures;
  return (
    <tr className={isSum ? 'bg-paper font-semibold' : 'bg-surface'}>
      <th
        scope="row"
        className="sticky left-0 border-t border-line bg-inherit px-3 py-2 text-left font-semibold max-sm:max-w-28 sm:whitespace-nowrap"
      >
        {name}
      </th>
      {doings.map((doing) => (
        <Td key={doing} number className={hours[doing] === 0 ? 'text-muted' : undefined}>
          {hoursText(hours[doing])}
        </Td>
      ))}
      <Td number>{hoursText(open)}</Td>
      <Td number>{hoursText(free)}</Td>
      <Td number className="whitespace-nowrap">
        {shareText(share)}
      </Td>
      <Td number className="whitespace-nowrap">
        {recorded} of {bookings}
      </Td>
    </tr>
  );
}
