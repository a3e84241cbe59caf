import { useSuspenseQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { InstrumentsRegister } from '../features/bench/instruments-register';
import { instrumentsQuery, runsQuery } from '../features/bench/queries';
import { RunsOverview } from '../features/bench/runs-overview';
import { formatCount } from '../lib/format';
import { queryClient } from '../lib/query-client';
import { PageBody, PageHeader } from '../ui/page-header';
import { Tabs } from '../ui/tabs';

export const loader = () =>
  Promise.all([
    queryClient.query({ ...runsQuery, staleTime: 'static' }),
    queryClient.query({ ...instrumentsQuery, staleTime: 'static' }),
  ]);

export function Component() {
  const { runs, cleared } = useSuspenseQuery(runsQuery).data;
  const { instruments, mayChange } = useSuspenseQuery(instrumentsQuery).data;
  const [search, setSearch] = useSearchParams();
  const overdue = instruments.filter(({ inCalibration }) => !inCalibration).length;
  return (
    <>
      <PageHeader
        title="Bench"
        meta={
          instruments.length === 0
            ? 'Runs on the shaker, and the instruments they are read with.'
            : overdue === 0
              ? 'Every instrument is in calibration.'
              : `${overdue} of ${formatCount(instruments.length, 'instrument')} out of calibration.`
        }
      />
      <PageBody>
        <Tabs
          label="Bench"
          selected={search.get('part') === 'instruments' ? 'instruments' : 'runs'}
          onSelect={(id) => setSearch(id === 'instruments' ? { part: id } : {}, { replace: true })}
          tabs={[
            { id: 'runs', label: 'Runs', count: runs.length, content: <RunsOverview runs={runs} cleared={cleared} /> },
            {
              id: 'instruments',
              label: 'Instruments',
              count: instruments.length,
              content: <InstrumentsRegister instruments={instruments} mayChange={mayChange} />,
            },
          ]}
        />
      </PageBody>
    </>
  );
}
