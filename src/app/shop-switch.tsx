import { ChevronDown } from 'lucide-react';
import { useMe, useShopChoice } from '#src/lib/session.ts';
import { Menu, MenuChoice } from '#src/ui/menu.tsx';

/** The shop's name; a menu where one belongs to several. */
export function ShopSwitch() {
  const { shops } = useMe();
  const { shop, choose } = useShopChoice();
  if (shops.length === 1) return <span className="truncate text-[0.8125rem] text-muted">{shop.name}</span>;
  return (
    <Menu
      trigger={
        <button
          type="button"
          className="flex min-h-control min-w-0 items-center gap-1.5 rounded px-2 text-[0.8125rem] text-muted hover:bg-paper hover:text-ink"
        >
          <span className="sr-only">Shop:</span>
          <span className="truncate">{shop.name}</span>
          <ChevronDown size={16} className="shrink-0" aria-hidden="true" />
        </button>
      }
    >
      <MenuChoice
        label="Shop in this tab"
        value={shop.id}
        onChange={choose}
        options={shops.map(({ id, name }) => ({ value: id, label: name }))}
      />
    </Menu>
  );
}
