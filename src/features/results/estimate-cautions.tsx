import type { Estimate } from '#contracts/estimates';
import { Caution } from '../../ui/caution';

const order = { stop: 0, caution: 1, info: 2 };

/** First sentence and the rest, so that the point stands out. */
export function pointOf(message: string): [string, string] {
  const end = /^.{12,140}?[.:](?=\s)/.exec(message)?.[0];
  return end === undefined ? ['', message] : [end, message.slice(end.length).trim()];
}

/** What to know before relying on the figures or touching the device; the gravest first. */
export function EstimateCautions({ estimate, say }: { estimate: Estimate; say: (message: string) => string }) {
  const cautions = [...estimate.cautions].sort((a, b) => order[a.severity] - order[b.severity]);
  if (cautions.length === 0) return null;
  return (
    <section aria-label="Cautions" className="flex flex-col gap-2.5">
      {cautions.map(({ code, severity, message, path }) => {
        const [point, rest] = pointOf(say(message));
        return (
          <Caution key={`${code} ${path ?? ''}`} severity={severity} title={point === '' ? undefined : point}>
            {rest}
            {path === null ? null : (
              <>
                {' '}
                <a href={`#field-${path}`} className="link whitespace-nowrap">
                  Go to the field
                </a>
              </>
            )}
          </Caution>
        );
      })}
    </section>
  );
}
