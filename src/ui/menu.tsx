import type { ReactNode } from 'react';
import { Menu as AriaMenu, Button, Header, MenuItem, MenuSection, MenuTrigger, Popover } from 'react-aria-components';

export interface MenuEntry {
  readonly id: string;
  readonly label: string;
  readonly current?: boolean;
}
export interface MenuGroup {
  readonly title: string;
  readonly entries: readonly MenuEntry[];
}

interface MenuProps {
  /** What the button shows. */
  readonly children: ReactNode;
  readonly label: string;
  readonly groups: readonly MenuGroup[];
  readonly onChoose: (id: string) => void;
}

/** A button with a menu of grouped entries; arrow keys, type-ahead and Escape are those of the platform. */
export function Menu({ children, label, groups, onChoose }: MenuProps) {
  return (
    <MenuTrigger>
      <Button
        aria-label={label}
        className="flex h-9 cursor-pointer items-center gap-1.5 text-body text-ink hover:text-indigo"
      >
        {children}
        <svg width="9" height="6" viewBox="0 0 9 6" aria-hidden="true">
          <path d="M1 1l3.5 3.5L8 1" fill="none" stroke="currentColor" strokeWidth="1.25" />
        </svg>
      </Button>
      <Popover placement="bottom end" className="min-w-56 rounded-md border border-line bg-paper py-1.5 shadow-float">
        <AriaMenu className="outline-none" onAction={(key) => onChoose(String(key))}>
          {groups.map((group) => (
            <MenuSection key={group.title} className="border-line not-first:mt-1.5 not-first:border-t not-first:pt-1.5">
              <Header className="px-3.5 pt-1 pb-0.5 text-fine text-soft">{group.title}</Header>
              {group.entries.map((entry) => (
                <MenuItem
                  key={entry.id}
                  id={entry.id}
                  textValue={entry.label}
                  className="flex min-h-9 items-center justify-between gap-4 px-3.5 outline-none data-focused:bg-shade"
                >
                  <span>{entry.label}</span>
                  {entry.current ? <span className="text-fine text-soft">in view</span> : null}
                </MenuItem>
              ))}
            </MenuSection>
          ))}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  );
}
