import { Check } from 'lucide-react';
import type { LucideIcon } from 'lucide-react';
import type { ReactElement, ReactNode } from 'react';
import { Header } from 'react-aria-components/Header';
import { Menu as AriaMenu, MenuItem, MenuSection, MenuTrigger } from 'react-aria-components/Menu';
import { Popover } from 'react-aria-components/Popover';
import { Separator } from 'react-aria-components/Separator';

export interface MenuAction {
  id: string;
  label: string;
  icon?: LucideIcon;
  onAction?: () => void;
  /** A path inside the application. */
  to?: string;
  danger?: boolean;
  /** Why it is not possible now: shown under the label, and the entry does nothing. */
  whyNot?: string | null | undefined;
}

export interface MenuGroup {
  id: string;
  title?: string;
  items: readonly MenuAction[];
  /** Ids of the items that are chosen, where the group is a choice: of one, as with a theme, or of several. */
  chosen?: readonly string[];
  multiple?: boolean;
  onChoose?: (ids: string[]) => void;
}

export interface MenuProps {
  label: string;
  /** A Button or IconButton of this kit. */
  trigger: ReactElement;
  groups: readonly MenuGroup[];
  /** Stands above the entries: a name, an address. */
  head?: ReactNode;
  placement?: 'bottom start' | 'bottom end' | 'top start' | 'top end';
}

const entry =
  'grid cursor-pointer grid-cols-[1.25rem_1fr] items-center gap-x-2 rounded px-2 py-1.5 outline-none data-[focused]:bg-wash data-[disabled]:cursor-default';

function Entry({ item, mark }: { item: MenuAction; mark?: boolean }) {
  const Icon = item.icon;
  return (
    <MenuItem
      id={item.id}
      textValue={item.whyNot ? `${item.label}: ${item.whyNot}` : item.label}
      href={item.to}
      onAction={item.whyNot ? undefined : item.onAction}
      isDisabled={Boolean(item.whyNot)}
      className={entry}
    >
      <span className="grid place-items-center text-graphite">
        {mark === undefined ? (
          Icon ? (
            <Icon aria-hidden className="size-4" strokeWidth={1.9} />
          ) : null
        ) : mark ? (
          <Check aria-hidden className="size-4 text-copper" strokeWidth={2.4} />
        ) : null}
      </span>
      <span className={item.whyNot ? 'text-graphite' : item.danger ? 'text-cinnabar' : undefined}>
        {item.label}
        {item.whyNot ? <span className="block text-sm">{item.whyNot}</span> : null}
      </span>
    </MenuItem>
  );
}

/** A menu of actions and choices. */
export function Menu({ label, trigger, groups, head, placement = 'bottom end' }: MenuProps) {
  return (
    <MenuTrigger>
      {trigger}
      <Popover placement={placement} offset={6} className="sheet max-w-80 min-w-56 overflow-auto shadow-(--lift)">
        {head ? <div className="border-b border-rule px-4 py-3">{head}</div> : null}
        <AriaMenu aria-label={label} className="p-1.5 outline-none">
          {groups.map((group, index) => (
            <MenuSection
              key={group.id}
              aria-label={group.title ?? label}
              {...(group.onChoose
                ? {
                    selectionMode: group.multiple ? ('multiple' as const) : ('single' as const),
                    disallowEmptySelection: true,
                    selectedKeys: group.chosen ?? [],
                    onSelectionChange: (keys) =>
                      group.onChoose?.(keys === 'all' ? group.items.map(({ id }) => id) : [...keys].map(String)),
                  }
                : {})}
            >
              {index > 0 ? <Separator className="my-1.5 border-t border-rule" /> : null}
              {group.title ? <Header className="px-2 py-1 text-sm text-graphite">{group.title}</Header> : null}
              {group.items.map((item) => (
                <Entry
                  key={item.id}
                  item={item}
                  mark={group.onChoose ? group.chosen?.includes(item.id) === true : undefined}
                />
              ))}
            </MenuSection>
          ))}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  );
}
