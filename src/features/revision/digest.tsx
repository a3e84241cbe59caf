import { classNames } from '../../ui/class-names';

/** A SHA-256 in groups of eight, so that two can be compared by eye; copying it gives it without gaps. */
export function Digest({ value, className }: { value: string; className?: string }) {
  return (
    <code className={classNames('text-sm wrap-anywhere text-graphite', className)} title="SHA-256">
      {(value.match(/.{1,8}/g) ?? []).map((part, index) => (
        <span key={index} className="mr-[0.45em] inline-block">
          {part}
        </span>
      ))}
    </code>
  );
}
