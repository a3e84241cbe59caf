import type { ReactNode } from 'react';

interface DesignPageLayoutProps {
  /** Notices above everything: frozen, restored, two drafts. */
  notices?: ReactNode;
  /** The headline in a line, for small screens, where it stays in view while the fields are typed. */
  bar: ReactNode;
  fields: ReactNode;
  strip: ReactNode;
  results: ReactNode;
  figures: ReactNode;
  more: ReactNode;
}

/**
 * Fields at the left, drawing and results in the middle, figures and the brief at the right. On narrower pages figures move under
 * the drawing; on a phone the drawing comes first, then the figures, then the fields.
 */
export function DesignPageLayout({ notices, bar, fields, strip, results, figures, more }: DesignPageLayoutProps) {
  const pane = '@[1000px]:sticky @[1000px]:top-0 @[1000px]:max-h-dvh @[1000px]:self-start @[1000px]:overflow-y-auto';
  return (
    <div className="@container">
      {notices ? (
        <div className="flex flex-col gap-2.5 border-b border-rule px-4 py-3 empty:hidden sm:px-6">{notices}</div>
      ) : null}
      <div className="sticky top-12 z-20 border-b border-rule bg-paper px-4 py-1.5 min-[900px]:top-0 @[720px]:hidden">
        {bar}
      </div>
      <div className="flex flex-col @[720px]:grid @[720px]:grid-cols-[19rem_minmax(0,1fr)] @[1000px]:grid-cols-[18.5rem_minmax(0,1fr)_18rem] @[1150px]:grid-cols-[20rem_minmax(0,1fr)_19rem] @[1800px]:grid-cols-[22rem_minmax(0,1fr)_24rem]">
        <section
          aria-label="Design document"
          className="order-3 border-rule px-4 py-5 @[720px]:order-none @[720px]:row-span-2 @[720px]:border-r"
        >
          {fields}
        </section>
        <div className={`contents @[720px]:flex @[720px]:flex-col @[720px]:gap-3.5 @[720px]:p-4 ${pane}`}>
          <section aria-label="Aligned strip" className="order-1 px-2 pt-3 @[720px]:order-none @[720px]:p-0">
            {strip}
          </section>
          <section aria-label="Results" className="order-4 px-2 py-3 @[720px]:order-none @[720px]:p-0">
            {results}
          </section>
        </div>
        <div
          className={`contents border-rule @[720px]:block @[720px]:border-t @[720px]:px-4 @[720px]:py-4 @[1000px]:border-t-0 @[1000px]:border-l ${pane}`}
        >
          <div className="order-2 flex flex-col gap-5 px-4 py-4 @[720px]:order-none @[720px]:p-0">{figures}</div>
          <div className="order-5 flex flex-col gap-6 px-4 pt-2 pb-6 @[720px]:order-none @[720px]:px-0 @[720px]:pt-5">
            {more}
          </div>
        </div>
      </div>
    </div>
  );
}
