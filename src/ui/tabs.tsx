import { Tabs as Radix } from 'radix-ui';
import type { ReactNode } from 'react';

type TabsProps<T extends string> = {
  label: string;
  value: T;
  onChange: (value: T) => void;
  tabs: readonly { value: T; label: ReactNode; content: ReactNode }[];
};

/** Tabs whose choice the page keeps, best in its address. */
export function Tabs<T extends string>({ label, value, onChange, tabs }: TabsProps<T>) {
  return (
    <Radix.Root value={value} onValueChange={(next) => onChange(next as T)}>
      <Radix.List aria-label={label} className="flex gap-1 overflow-x-auto border-b border-line">
        {tabs.map((tab) => (
          <Radix.Trigger
            key={tab.value}
            value={tab.value}
            className="-mb-px flex min-h-control items-center gap-2 border-b-2 border-transparent px-3 font-semibold whitespace-nowrap text-muted -outline-offset-2 hover:text-ink data-[state=active]:border-ember data-[state=active]:text-ink"
          >
            {tab.label}
          </Radix.Trigger>
        ))}
      </Radix.List>
      {tabs.map((tab) => (
        <Radix.Content key={tab.value} value={tab.value} className="pt-4">
          {tab.content}
        </Radix.Content>
      ))}
    </Radix.Root>
  );
}
