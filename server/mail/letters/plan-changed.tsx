/** @jsxRuntime automatic */
import { Section, Text } from '@react-email/components';
import type { PlanChangedData, PlanSlot } from '../../db/letters.ts';
import type { Letter } from '../mailer.ts';
import { colour, paragraph, small, write } from './layout.tsx';

export type PlanChangedLetter = PlanChangedData & {
  name: string;
  shopName: string;
  /** IANA name of the shop's zone; all times are told in it. */
  timeZone: string;
  clock: '24' | '12';
  link: string;
};

type Change = PlanChangedData['changes'][number];

const words: Record<Change['kind'], string> = { planned: 'Planned', moved: 'Moved', 'taken-off': 'Taken off' };

export function planChangedLetter(letter: PlanChangedLetter): Promise<Letter> {
  const { name, shopName, planNumber, changes, link } = letter;
  const count = changes.length === 1 ? 'One change' : `${changes.length} changes`;
  return write(`${count} in your work: plan ${planNumber}`, {
    preview: changes.map((change) => `${words[change.kind]}: ${change.jobTitle}`).join(', '),
    title: `${count} in your work`,
    action: { label: 'Open my bench', href: link },
    why: `You get this because ${shopName} posted plan ${planNumber} and it changes what is yours. Times are the shop's.`,
    children: (
      <>
        <Text style={paragraph}>Hello {name}, a new plan was posted. For you it changes:</Text>
        {changes.map((change, index) => (
          <ChangeRow key={index} change={change} told={slotTeller(letter)} />
        ))}
      </>
    ),
  });
}

function ChangeRow({ change, told }: { change: Change; told: (slot: PlanSlot) => string }) {
  const { kind, jobNumber, jobTitle, stageTitle, from, to } = change;
  return (
    <Section style={{ borderLeft: `3px solid ${colour.ember}`, margin: '0 0 16px', paddingLeft: '12px' }}>
      <Text style={{ ...paragraph, fontWeight: 600, margin: '0' }}>
        {words[kind]}: {stageTitle}
      </Text>
      <Text style={{ ...small, margin: '0' }}>
        Job {jobNumber}, {jobTitle}
      </Text>
      {to && <Text style={{ ...paragraph, margin: '4px 0 0' }}>{told(to)}</Text>}
      {from && <Text style={{ ...small, margin: '4px 0 0' }}>Before: {told(from)}</Text>}
    </Section>
  );
}

/** "Tue 10 Mar, 08:00 to 09:30, Booth 1" in the shop's zone and by the reader's clock. */
function slotTeller({ timeZone, clock }: PlanChangedLetter): (slot: PlanSlot) => string {
  const day = new Intl.DateTimeFormat('en-GB', { timeZone, weekday: 'short', day: 'numeric', month: 'short' });
  const time =
    clock === '12'
      ? new Intl.DateTimeFormat('en-US', { timeZone, hour: 'numeric', minute: '2-digit', hour12: true })
      : new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });
  return ({ placeName, startsAt, endsAt }) => {
    const [start, end] = [new Date(startsAt), new Date(endsAt)];
    const [first, last] = [day.format(start), day.format(end)];
    return `${first}, ${time.format(start)} to ${first === last ? '' : `${last}, `}${time.format(end)}, ${placeName}`;
  };
}
