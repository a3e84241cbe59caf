import { useMemo } from 'react';
import type { CatalogueEntry } from '#contracts/catalogue';
import { dimensions } from '#contracts/quantity';
import type { Dimension } from '#contracts/quantity';
import { unitScale } from '../../lib/quantities';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Quantity } from '../../ui/quantity';
import { Tabs } from '../../ui/tabs';

type Kind = CatalogueEntry['kind'];

const kinds: readonly { kind: Kind; title: string; key: string; find: string }[] = [
  { kind: 'magnetMaterial', title: 'Magnet materials', key: 'Material', find: 'Find a material' },
  { kind: 'wire', title: 'Wires', key: 'Wire', find: 'Find a wire' },
  { kind: 'diode', title: 'Diodes', key: 'Diode', find: 'Find a diode' },
];

/** One unit down a column, so that figures can be compared; others take the prefix an engineer would choose. */
const columnUnits: Partial<Record<Dimension, string>> = {
  fluxDensity: 'T',
  fieldStrength: 'kA/m',
  density: 'kg/m³',
  length: 'mm',
  temperature: '°C',
  perKelvin: '%/K',
};

/** Heads short enough for a column; the export and the column choice keep the full words where there are none. */
const shortTitles: Record<string, string> = {
  'Remanence at 20 °C': 'Remanence',
  'Recoil permeability': 'Recoil',
  'Remanence over temperature': 'Remanence drift',
  'Intrinsic coercivity, least': 'Coercivity',
  'Coercivity over temperature': 'Coercivity drift',
  'Highest temperature': 'Hottest',
};
/** Shown on demand: they say more than choosing needs. */
const further = new Set(['Remanence, lowest', 'Remanence, highest', 'Coercivity over temperature']);

const isDimension = (name: string): name is Dimension => name in dimensions;

function propertyColumn(label: string, dimensionName: string): TableColumn<CatalogueEntry> {
  const dimension = isDimension(dimensionName) ? dimensionName : 'number';
  const unit = columnUnits[dimension];
  const scale = unit === undefined ? null : unitScale(dimension, unit);
  const found = (entry: CatalogueEntry) => entry.properties.find((property) => property.label === label)?.value ?? null;
  return {
    id: label.toLowerCase().replace(/[^a-z0-9]+/g, '-'),
    title: shortTitles[label] ?? label,
    hidden: further.has(label),
    ...(unit === undefined ? {} : { unit }),
    align: 'end',
    value: (entry) => {
      const value = found(entry);
      return value === null || scale === null ? value : Number((value / scale).toPrecision(12));
    },
    // A column with its unit in the head shows the figure alone.
    ...(unit === undefined
      ? { cell: (entry: CatalogueEntry) => <Quantity value={found(entry)} dimension={dimension} absent="not stated" /> }
      : {}),
  };
}

function columnsOf(entries: readonly CatalogueEntry[], key: string): TableColumn<CatalogueEntry>[] {
  const properties = new Map(
    entries.flatMap((entry) => entry.properties.map(({ label, dimension }) => [label, dimension] as const)),
  );
  return [
    {
      id: 'key',
      title: key,
      value: (entry) => entry.key,
      cell: (entry) => <span className="font-mono whitespace-nowrap">{entry.key}</span>,
    },
    ...[...properties].map(([label, dimension]) => propertyColumn(label, dimension)),
    {
      id: 'source',
      title: 'Source',
      value: ({ source }) => source,
      cell: ({ source }) => <Source text={source} />,
    },
  ];
}

/** Where figures come from, in its first words; how well they are known and what to beware of, on demand. */
function Source({ text }: { text: string }) {
  const [head = '', ...rest] = text.split(/ (?=\()/);
  const words = 'block w-60 max-w-full text-sm text-graphite';
  if (rest.length === 0) return <span className={words}>{text}</span>;
  return (
    <details className={words}>
      <summary>{head}</summary>
      {rest.join(' ')}
    </details>
  );
}

function KindTable({
  entries,
  title,
  keyTitle,
  find,
}: {
  entries: readonly CatalogueEntry[];
  title: string;
  keyTitle: string;
  find: string;
}) {
  const columns = useMemo(() => columnsOf(entries, keyTitle), [entries, keyTitle]);
  return (
    <DataTable
      label={title}
      rows={entries}
      columns={columns}
      rowKey={({ key }) => key}
      filterLabel={find}
      empty={
        <EmptyState title="None in the catalogue.">
          A design document can carry the properties themselves instead of a name.
        </EmptyState>
      }
    />
  );
}

/** Materials, wires and diodes that a design document can name, each with the source of its figures. */
export function CatalogueTables({ entries }: { entries: readonly CatalogueEntry[] }) {
  return (
    <Tabs
      label="Catalogue"
      tabs={kinds.map(({ kind, title, key, find }) => {
        const own = entries.filter((entry) => entry.kind === kind);
        return {
          id: kind,
          label: title,
          count: own.length,
          content: <KindTable entries={own} title={title} keyTitle={key} find={find} />,
        };
      })}
    />
  );
}
