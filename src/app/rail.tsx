import { NavLink } from 'react-router-dom';
import { classNames } from '../ui/class-names';
import type { RailSection } from './sections';

/** The left rail: the sections this person may enter. */
export function Rail({ sections }: { sections: readonly RailSection[] }) {
  return (
    <nav aria-label="Sections">
      <ul className="flex flex-col gap-0.5">
        {sections.map(({ section, label, to, waiting }) => (
          <li key={section}>
            <NavLink
              to={to}
              end={to === '/'}
              className={({ isActive }) =>
                classNames(
                  'flex min-h-9 items-center justify-between rounded-md px-2.5 pointer-coarse:min-h-11',
                  isActive ? 'bg-wash font-bold shadow-[inset_3px_0_0_var(--copper)]' : 'hover:bg-wash',
                )
              }
            >
              {label}
              {waiting ? (
                <span className="font-mono text-copper">
                  <span aria-hidden>{waiting}</span>
                  <span className="sr-only">, {waiting} waiting for you</span>
                </span>
              ) : null}
            </NavLink>
          </li>
        ))}
      </ul>
    </nav>
  );
}
