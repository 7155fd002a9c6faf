import { useMe } from '#src/lib/session.ts';
import { chooseTheme, useTheme, type Theme } from '#src/lib/theme.ts';
import { Choice } from '#src/ui/choice.tsx';
import { Page } from '#src/ui/page.tsx';
import { ChangePassword } from './change-password.tsx';
import { NameForm } from './name-form.tsx';
import { Section } from './section.tsx';
import { useChangeAccount } from './use-change-account.ts';
import { ErrorNote } from '#src/ui/error-note.tsx';

const themes: { value: Theme; label: string }[] = [
  { value: 'system', label: 'As the system' },
  { value: 'light', label: 'Day' },
  { value: 'dark', label: 'Night shift' },
];
const clocks = [
  { value: '24', label: '14:30' },
  { value: '12', label: '2:30 pm' },
] as const;
const units = [
  { value: 'C', label: '°C' },
  { value: 'F', label: '°F' },
] as const;

export function Component() {
  const { account } = useMe();
  const theme = useTheme();
  const change = useChangeAccount();
  // The choice shows at once and falls back by itself where the server refuses it.
  const asked = change.isPending ? change.variables : {};
  return (
    <Page title="Your account" about={account.email} width="text">
      <Section title="Name">
        <NameForm name={account.name} />
      </Section>
      <Section title="How things are written">
        <div className="flex flex-wrap gap-x-8 gap-y-4">
          <Choice
            label="Clock"
            options={clocks}
            value={asked.clock ?? account.clock}
            onChange={(clock) => change.mutate({ clock })}
          />
          <Choice
            label="Temperatures"
            options={units}
            value={asked.temperatureUnit ?? account.temperatureUnit}
            onChange={(temperatureUnit) => change.mutate({ temperatureUnit })}
          />
          <Choice label="Theme of this browser" options={themes} value={theme} onChange={chooseTheme} />
        </div>
        {change.isError && <ErrorNote error={change.error} what="The choice could not be kept." />}
      </Section>
      <Section title="Password">
        <ChangePassword email={account.email} />
      </Section>
    </Page>
  );
}
