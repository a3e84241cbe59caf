import { Link } from 'react-router-dom';
import type { ReactNode } from 'react';
import type { Desk } from '#contracts/desk';
import { formatAgo, formatDateTime } from '../../lib/format';
import { Section } from '../../ui/page-header';
import { Count } from '../../ui/status';

type DeskItem = Desk['waitsForMe'][number];

const Moment = ({ at }: { at: string }) => (
  <time dateTime={at} title={formatDateTime(at)} className="text-sm whitespace-nowrap text-graphite">
    {formatAgo(at)}
  </time>
);

function Items({ items, urgent }: { items: readonly DeskItem[]; urgent?: boolean }) {
  return (
    <ul className="flex flex-col">
      {items.map((item) => (
        <li key={`${item.href} ${item.what}`} className="border-b border-rule">
          <Link
            to={item.href}
            className={`group grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 py-2.5 pl-3 hover:bg-wash ${urgent ? 'border-l-[3px] border-copper' : 'border-l-[3px] border-transparent'}`}
          >
            <span className="min-w-0">
              <span className="font-semibold wrap-anywhere group-hover:underline">{item.title}</span>
              <span className="block wrap-anywhere">{item.what}</span>
            </span>
            <Moment at={item.since} />
          </Link>
        </li>
      ))}
    </ul>
  );
}

interface DeskSheetProps {
  desk: Desk;
  /** Where somebody with these roles may begin, when nothing waits. */
  firstSteps: ReactNode;
}

/** What waits for a person and why, what that person waits for, and what happened lately. */
export function DeskSheet({ desk: { waitsForMe, iWaitFor, recent }, firstSteps }: DeskSheetProps) {
  return (
    <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="Waits for me" aside={waitsForMe.length === 0 ? null : <Count>{waitsForMe.length}</Count>}>
          {waitsForMe.length === 0 ? (
            <div className="flex flex-col items-start gap-3">
              <p className="text-graphite">Nothing waits for you.</p>
              {firstSteps}
            </div>
          ) : (
            <Items items={waitsForMe} urgent />
          )}
        </Section>
        <Section
          title="I wait for"
          aside={iWaitFor.length === 0 ? null : <Count tone="neutral">{iWaitFor.length}</Count>}
        >
          {iWaitFor.length === 0 ? (
            <p className="text-graphite">Nothing of yours is with somebody else.</p>
          ) : (
            <Items items={iWaitFor} />
          )}
        </Section>
      </div>
      <Section title="Lately" className="min-w-0">
        {recent.length === 0 ? (
          <p className="text-graphite">
            Nothing has happened yet. Every step of a revision is told here in a sentence.
          </p>
        ) : (
          <ol className="flex flex-col">
            {recent.map((entry, index) => (
              <li
                key={`${entry.at} ${index}`}
                className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-4 border-b border-rule py-2"
              >
                <span className="min-w-0 wrap-anywhere">
                  {entry.sentence}
                  <Link to={entry.href} className="link block w-fit text-sm">
                    {entry.title}
                  </Link>
                </span>
                <Moment at={entry.at} />
              </li>
            ))}
          </ol>
        )}
      </Section>
    </div>
  );
}
