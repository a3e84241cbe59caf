import { Plus, X } from 'lucide-react';
import type { ReactNode } from 'react';
import { Button, IconButton } from '../../ui/button';
import { FieldGroup } from '../../ui/form';
import { listLength, readAt } from './document-path';
import { useDocumentForm } from './document-form';
import { nextOf } from './kinds';

interface PartListProps {
  path: string;
  /** “Magnet”, “Coil”. */
  name: string;
  aside: (index: number) => ReactNode;
  start: unknown;
  most?: number;
  children: (path: string, index: number) => ReactNode;
}

/** Several parts of one sort, each a group of its own; more can be added, all but the last removed. */
export function PartList({ path, name, aside, start, most = 40, children }: PartListProps) {
  const { document, addTo, removeFrom, readOnly, issueAt } = useDocumentForm();
  const count = listLength(document, path);
  const list = readAt(document, path);
  const issue = issueAt(path);
  const small = name.toLowerCase();
  return (
    <>
      {Array.from({ length: count }, (_, index) => (
        <FieldGroup
          key={index}
          title={count > 1 ? `${name} ${index + 1}` : name}
          aside={
            <span className="flex items-center gap-1">
              {aside(index)}
              {readOnly || count < 2 ? null : (
                <IconButton
                  icon={X}
                  size="small"
                  label={`Remove ${small} ${index + 1}`}
                  onPress={() => removeFrom(path, index)}
                  className="-my-1.5 min-h-7! w-7!"
                />
              )}
            </span>
          }
        >
          {children(`${path}.${index}`, index)}
          {readOnly || index < count - 1 || count >= most ? null : (
            <AddPart {...{ small }} onAdd={() => addTo(path, nextOf(list as unknown[], start))} />
          )}
        </FieldGroup>
      ))}
      {count === 0 ? (
        <FieldGroup title={name}>
          <p className="text-graphite">There is no {small} yet.</p>
          {readOnly ? null : <AddPart {...{ small }} onAdd={() => addTo(path, start)} />}
        </FieldGroup>
      ) : null}
      {issue ? <p className="text-sm text-cinnabar">{`${name}s: ${issue}.`}</p> : null}
    </>
  );
}

const AddPart = ({ small, onAdd }: { small: string; onAdd: () => void }) => (
  <Button
    size="small"
    variant="quiet"
    icon={Plus}
    className="-mb-1.5 -ml-2.5 self-start text-graphite!"
    onPress={onAdd}
  >
    Add a {small}
  </Button>
);
