import { Plus } from 'lucide-react';
import { useMemo, useState } from 'react';
import type { Person } from '#contracts/people';
import { roleWords } from '#workflows/revision';
import { formatAgo, formatDate, formatDateTime } from '../../lib/format';
import { Button } from '../../ui/button';
import { Section } from '../../ui/page-header';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { Status } from '../../ui/status';
import { AddPersonDialog } from './add-person-dialog';
import { ChangePersonDialog } from './change-person-dialog';

const columns: readonly TableColumn<Person>[] = [
  { id: 'name', title: 'Name', value: ({ name }) => name },
  { id: 'email', title: 'E-mail', value: ({ email }) => email },
  {
    id: 'roles',
    title: 'Roles',
    value: ({ roles }) => roles.map((role) => roleWords[role]).join(', '),
    cell: ({ roles }) =>
      roles.length === 0 ? (
        <span className="text-graphite">none yet</span>
      ) : (
        roles.map((role) => roleWords[role]).join(', ')
      ),
  },
  {
    id: 'active',
    title: 'Account',
    value: ({ active }) => (active ? 'active' : 'deactivated'),
    cell: ({ active }) => <Status tone={active ? 'good' : 'neutral'}>{active ? 'active' : 'deactivated'}</Status>,
  },
  {
    id: 'seen',
    title: 'Last signed in',
    value: ({ lastSignInAt }) => lastSignInAt,
    cell: ({ lastSignInAt }) =>
      lastSignInAt === null ? (
        <span className="text-graphite">never</span>
      ) : (
        <time dateTime={lastSignInAt} title={formatDateTime(lastSignInAt)}>
          {formatAgo(lastSignInAt)}
        </time>
      ),
  },
  {
    id: 'since',
    title: 'Since',
    value: ({ createdAt }) => createdAt,
    cell: ({ createdAt }) => formatDate(createdAt),
    hidden: true,
  },
];

/** Everybody with an account. `meId` is the administrator who looks at them. */
export function PeopleTable({ people, meId }: { people: readonly Person[]; meId: string }) {
  const [adding, setAdding] = useState(false);
  const [changingId, setChangingId] = useState<string | null>(null);
  const changing = people.find(({ id }) => id === changingId);
  const withButton = useMemo(
    (): readonly TableColumn<Person>[] => [
      ...columns,
      {
        id: 'change',
        title: 'Change',
        value: () => null,
        unsortable: true,
        unexported: true,
        align: 'end',
        cell: (person) => (
          <Button
            size="small"
            className="-my-1.5"
            variant="quiet"
            aria-label={`Change ${person.name}`}
            onPress={() => setChangingId(person.id)}
          >
            Change
          </Button>
        ),
      },
    ],
    [],
  );
  return (
    <>
      <Section
        title="People"
        aside={
          <Button variant="primary" icon={Plus} onPress={() => setAdding(true)}>
            Add a person
          </Button>
        }
      >
        <p className="max-w-prose text-graphite">
          One person may hold several roles. Who wrote or edited a revision never decides on it, whatever the roles.
          Nobody sees a password but its owner.
        </p>
        <DataTable
          label="People"
          rows={people}
          columns={withButton}
          rowKey={({ id }) => id}
          filterLabel="Find a person"
          initialSort={{ column: 'name' }}
        />
      </Section>
      {adding ? <AddPersonDialog onClose={() => setAdding(false)} /> : null}
      {changing ? (
        <ChangePersonDialog
          key={changing.id}
          person={changing}
          isSelf={changing.id === meId}
          onClose={() => setChangingId(null)}
        />
      ) : null}
    </>
  );
}
