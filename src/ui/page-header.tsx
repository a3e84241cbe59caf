import { useEffect } from 'react';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { classNames } from './class-names';

export interface Crumb {
  label: string;
  to?: string;
}

export interface PageHeaderProps {
  title: string;
  /** The way here; the last one is this page's number or is left out. */
  crumbs?: readonly Crumb[];
  /** State, dates, people: one quiet line under the title. */
  meta?: ReactNode;
  /** At the right: quiet words, other actions, then the one primary action. */
  actions?: ReactNode;
  /** Title of the browser's tab where it should differ. */
  documentTitle?: string;
}

/** Names the tab after the page; the product's name follows. */
export function useDocumentTitle(title: string): void {
  useEffect(() => {
    document.title = title === '' ? 'Tremolode' : `${title} · Tremolode`;
  }, [title]);
}

/** Head of a work page: the way here, the subject, its state, and one primary action at the right. */
export function PageHeader({ title, crumbs, meta, actions, documentTitle }: PageHeaderProps) {
  useDocumentTitle(documentTitle ?? title);
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3 border-b border-rule px-4 py-4 sm:px-6">
      <div className="min-w-0">
        {crumbs && crumbs.length > 0 ? (
          <nav aria-label="Breadcrumb">
            <ol className="flex flex-wrap text-graphite">
              {crumbs.map((crumb, index) => (
                <li key={crumb.label} className={classNames(crumb.to === undefined && 'font-mono')}>
                  {index > 0 ? (
                    <span aria-hidden className="px-1.5 font-sans">
                      /
                    </span>
                  ) : null}
                  {crumb.to === undefined ? (
                    crumb.label
                  ) : (
                    <Link to={crumb.to} className="hover:text-ink hover:underline">
                      {crumb.label}
                    </Link>
                  )}
                </li>
              ))}
            </ol>
          </nav>
        ) : null}
        <h1 className="wrap-anywhere">{title}</h1>
        {meta ? <div className="mt-1 flex flex-wrap items-center gap-x-4 gap-y-1 text-graphite">{meta}</div> : null}
      </div>
      {actions ? (
        <div className="flex flex-wrap items-start gap-2.5 *:[span]:flex *:[span]:min-h-9.5 *:[span]:items-center">
          {actions}
        </div>
      ) : null}
    </header>
  );
}

/** The page beneath its header. */
export function PageBody({ children, className }: { children: ReactNode; className?: string }) {
  return <div className={classNames('px-4 py-5 sm:px-6', className)}>{children}</div>;
}

interface SectionProps {
  title: string;
  aside?: ReactNode;
  children: ReactNode;
  className?: string;
}

/** A titled part of a page. */
export function Section({ title, aside, children, className }: SectionProps) {
  return (
    <section className={classNames('flex flex-col gap-3', className)}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 border-b border-rule pb-1.5">
        <h2>{title}</h2>
        {aside}
      </div>
      {children}
    </section>
  );
}
