import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import { classNames } from '../../ui/class-names';

const parts = [
  { to: '/administration/people', label: 'People' },
  { to: '/administration/mail', label: 'Mail' },
  { to: '/administration/audit', label: 'Audit trail' },
];

/** The parts of administration, each at an address of its own. */
export function AdministrationFrame({ children }: { children: ReactNode }) {
  return (
    <>
      <nav aria-label="Administration" className="flex gap-x-5 overflow-x-auto border-b border-rule px-4 sm:px-6">
        {parts.map(({ to, label }) => (
          <NavLink
            key={to}
            to={to}
            className={({ isActive }) =>
              classNames(
                '-mb-px shrink-0 border-b-2 py-2 focus-visible:outline-offset-[-2px]',
                isActive ? 'border-copper font-bold text-ink' : 'border-transparent text-graphite hover:text-ink',
              )
            }
          >
            {label}
          </NavLink>
        ))}
      </nav>
      {children}
    </>
  );
}
