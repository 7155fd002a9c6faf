import { ChevronDown, Inbox, LogOut, Mails, ScrollText, Settings2, UserRound, UsersRound } from 'lucide-react';
import { Link } from 'react-router-dom';
import { may, useMe, useShop } from '#src/lib/session.ts';
import { chooseTheme, useTheme, type Theme } from '#src/lib/theme.ts';
import { Menu, MenuChoice, MenuItem, MenuLine } from '#src/ui/menu.tsx';
import { paths } from './paths.ts';
import { roleWord } from '#src/lib/role-words.ts';
import { useSetUpPath } from './use-set-up-path.ts';
import { useSignOut } from './use-sign-out.ts';

const themes: { value: Theme; label: string }[] = [
  { value: 'system', label: 'As the system' },
  { value: 'light', label: 'Day' },
  { value: 'dark', label: 'Night shift' },
];

export function AccountMenu() {
  const { account, localMailbox } = useMe();
  const shop = useShop();
  const theme = useTheme();
  const signOut = useSignOut();
  const links = [
    { to: paths.account(), label: 'Your account', Icon: UserRound, seen: true },
    { to: useSetUpPath(), label: 'Set-up', Icon: Settings2, seen: true },
    { to: paths.members(), label: 'Members', Icon: UsersRound, seen: may.setUp(shop.role) },
    { to: paths.letters(), label: 'Letters sent', Icon: Mails, seen: may.setUp(shop.role) },
    { to: paths.mailbox(), label: 'Local mailbox', Icon: Inbox, seen: localMailbox },
    { to: paths.licences(), label: 'Licences and cautions', Icon: ScrollText, seen: true },
  ].filter((link) => link.seen);
  return (
    <Menu
      trigger={
        <button
          type="button"
          className="flex min-h-control min-w-0 items-center gap-1.5 rounded px-2 text-[0.8125rem] hover:bg-paper"
        >
          <span className="sr-only">Account menu of</span>
          <span className="truncate">
            <span className="font-semibold">{account.name}</span>
            <span className="text-muted max-lg:hidden">, {roleWord[shop.role]}</span>
          </span>
          <ChevronDown size={16} className="shrink-0 text-muted" aria-hidden="true" />
        </button>
      }
    >
      {links.map(({ to, label, Icon }) => (
        <MenuItem key={to} asChild>
          <Link to={to}>
            <Icon size={16} className="text-muted" aria-hidden="true" />
            {label}
          </Link>
        </MenuItem>
      ))}
      <MenuLine />
      <MenuChoice label="Theme" value={theme} onChange={chooseTheme} options={themes} />
      <MenuLine />
      <MenuItem icon={<LogOut size={16} className="text-muted" aria-hidden="true" />} onSelect={() => signOut.mutate()}>
        Sign out
      </MenuItem>
    </Menu>
  );
}
