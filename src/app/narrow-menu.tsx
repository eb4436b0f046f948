import { type ReactNode, type RefObject, useCallback, useEffect, useId, useRef, useState } from 'react';
import { Link, NavLink, useLocation } from 'react-router-dom';
import type { Membership, Session } from '../contract/accounts.ts';
import { errorSentence } from '../lib/api-error.ts';
import { paths } from '../lib/paths.ts';
import { Button } from '../ui/button.tsx';
import { accountWords, type ProgrammeLink, pageLinks } from './top-links.ts';
import { useSignOut } from './use-sign-out.ts';

interface NarrowMenuProps {
  readonly person: NonNullable<Session['person']>;
  readonly team: Membership;
  readonly programmes: readonly ProgrammeLink[];
}

/**
 * The pages behind one button on a narrow screen: a list of links that unfolds under the bar. Escape, a press beside it,
 * leaving it with the keyboard, and going anywhere fold it up; Escape gives the button the focus back.
 */
export function NarrowMenu({ person, team, programmes }: NarrowMenuProps) {
  // Open on one page alone: going anywhere, by Back as well, folds it up.
  const { key: here } = useLocation();
  const [openAt, setOpenAt] = useState<string | null>(null);
  const isOpen = openAt === here;
  const menu = useRef<HTMLElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const id = useId();
  const leave = useSignOut();
  const close = useCallback(() => setOpenAt(null), []);
  useCloseOutside(menu, close);
  const closeByKey = (key: string) => {
    if (key !== 'Escape' || !isOpen) return;
    close();
    button.current?.focus();
  };
  return (
    <nav ref={menu} aria-label="Main" className="flex items-center" onKeyDown={({ key }) => closeByKey(key)}>
      <button
        ref={button}
        type="button"
        aria-expanded={isOpen}
        aria-controls={id}
        onClick={() => setOpenAt(isOpen ? null : here)}
        className="flex min-h-11 items-center gap-2 rounded-md border border-[#b9af9b] px-3 font-semibold text-indigo"
      >
        Menu
        <svg width="14" height="10" viewBox="0 0 14 10" aria-hidden="true">
          <path
            d={isOpen ? 'M2 0.5l10 9M12 0.5l-10 9' : 'M0 1h14M0 5h14M0 9h14'}
            stroke="currentColor"
            strokeWidth="1.5"
            fill="none"
          />
        </svg>
      </button>
      <div
        id={id}
        hidden={!isOpen}
        className="absolute inset-x-0 top-full z-40 max-h-[calc(100dvh-3.25rem)] overflow-y-auto border-b border-line bg-paper px-4 py-2 shadow-float"
      >
        <Links links={pageLinks(team)} onFollow={close} />
        {programmes.length > 1 ? (
          <Part title="Programmes">
            <Links links={programmes} onFollow={close} />
          </Part>
        ) : null}
        <Part title={accountWords(person, team)}>
          <div className="flex min-h-11 items-center justify-between gap-4">
            <Link to={paths.account} onClick={close} className="flex min-h-11 min-w-0 items-center truncate">
              {person.name}: account and notices
            </Link>
            <Button busy={leave.isPending} onClick={() => leave.mutate()}>
              Sign out
            </Button>
          </div>
          {leave.isError ? (
            <p role="alert" className="text-fine text-madder">
              {errorSentence(leave.error)}
            </p>
          ) : null}
        </Part>
      </div>
    </nav>
  );
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="mt-2 border-t border-line pt-2">
      <p className="text-fine text-soft">{title}</p>
      {children}
    </section>
  );
}

function Links({ links, onFollow }: { links: readonly ProgrammeLink[]; onFollow: () => void }) {
  return (
    <ul>
      {links.map(({ to, label }) => (
        <li key={to}>
          <NavLink
            to={to}
            onClick={onFollow}
            className={({ isActive }) =>
              `flex min-h-11 items-center border-l-3 pl-3 text-lead no-underline ${
                isActive ? 'border-indigo font-semibold text-ink' : 'border-transparent text-ink'
              }`
            }
          >
            {label}
          </NavLink>
        </li>
      ))}
    </ul>
  );
}

/** A press beside the menu, or the keyboard leaving it, closes it. */
function useCloseOutside(menu: RefObject<HTMLElement | null>, close: () => void): void {
  useEffect(() => {
    const look = ({ target }: Event) => {
      if (target instanceof Node && menu.current?.contains(target) === false) close();
    };
    document.addEventListener('pointerdown', look);
    document.addEventListener('focusin', look);
    return () => {
      document.removeEventListener('pointerdown', look);
      document.removeEventListener('focusin', look);
    };
  }, [menu, close]);
}
