import { Link } from 'react-router-dom';
import type { ReactNode } from 'react';
import type { Brief, BriefDocument } from '#contracts/briefs';
import { comparisonSign, requirementQuantities, shownByWords } from '#contracts/requirement';
import type { Requirement } from '#contracts/requirement';
import { formatDateTime, formatNumber } from '../../lib/format';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { KeyFigures } from '../../ui/key-figures';
import { Section } from '../../ui/page-header';
import { Figure, Quantity } from '../../ui/quantity';
import { envelopeWords, orientationWords } from './brief-words';
import { VibrationSheet } from './vibration-sheet';

const columns: readonly TableColumn<Requirement>[] = [
  { id: 'title', title: 'Requirement', value: ({ title }) => title },
  { id: 'quantity', title: 'Quantity', value: ({ quantity }) => requirementQuantities[quantity].label },
  {
    id: 'limit',
    title: 'Limit',
    value: ({ limit }) => limit,
    cell: ({ quantity, comparison, limit, unit }) => (
      <>
        {comparisonSign[comparison]}{' '}
        <Quantity
          value={limit}
          dimension={requirementQuantities[quantity].dimension}
          {...(unit === '' ? {} : { unit })}
        />
      </>
    ),
  },
  { id: 'shownBy', title: 'Shown by', value: ({ shownBy }) => shownByWords[shownBy] },
];

export function RequirementsTable({ requirements }: { requirements: readonly Requirement[] }) {
  return (
    <DataTable
      plain
      label="Requirements"
      rows={requirements}
      columns={columns}
      rowKey={({ id }) => id}
      empty={
        <p className="text-graphite">
          No requirements yet. Without any, an estimate and a bench run have nothing to be held against.
        </p>
      }
    />
  );
}

/** An absent figure is said in words: nothing was asked. */
const asked = (text: string): ReactNode => (text === '' ? <span className="text-graphite">not stated</span> : text);

function Needs({ document }: { document: BriefDocument }) {
  const { powerNeeded, loadNote, envelope, massLimit, temperature, lifeCycles, orientation } = document;
  return (
    <KeyFigures
      ruled
      figures={[
        { label: 'Power needed', value: <Quantity value={powerNeeded} dimension="power" className="font-semibold" /> },
        { label: 'Load', value: asked(loadNote) },
        { label: 'Envelope', value: envelopeWords(envelope) },
        {
          label: 'Mass at most',
          value: massLimit === null ? asked('') : <Quantity value={massLimit} dimension="mass" />,
        },
        {
          label: 'Temperature',
          value: (
            <>
              <Quantity value={temperature.lowest} dimension="temperature" /> to{' '}
              <Quantity value={temperature.highest} dimension="temperature" />
            </>
          ),
        },
        {
          label: 'Life',
          value: lifeCycles === null ? asked('') : <Figure number={formatNumber(lifeCycles)} unit="cycles" />,
        },
        { label: 'Orientation', value: orientationWords[orientation] },
      ]}
    />
  );
}

function Setting({ brief: { document, createdAt, createdBy, updatedAt, updatedBy, version } }: { brief: Brief }) {
  return (
    <KeyFigures
      ruled
      figures={[
        { label: 'Machine', value: asked(document.machine) },
        { label: 'Place', value: asked(document.place) },
        { label: 'Contact', value: asked(document.customerContact) },
        { label: 'Written', value: `${createdBy.name}, ${formatDateTime(createdAt)}` },
        { label: 'Last changed', value: `${updatedBy.name}, ${formatDateTime(updatedAt)} (version ${version})` },
      ]}
    />
  );
}

interface BriefSheetProps {
  brief: Brief;
  /** The button that starts a design, drawn by the page. */
  startDesign: ReactNode;
}

/** A brief as one reads it: what there is to live on, what is asked, what it is held against, what came of it. */
export function BriefSheet({ brief, startDesign }: BriefSheetProps) {
  const { document, designs } = brief;
  return (
    <div className="grid max-w-[110rem] gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,3fr)_minmax(20rem,2fr)]">
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="Vibration">
          <VibrationSheet vibration={document.vibration} inWords={brief.vibrationInWords} />
        </Section>
        <Section title="Requirements">
          <RequirementsTable requirements={document.requirements} />
        </Section>
        {document.notes === '' ? null : (
          <Section title="Notes">
            <p className="max-w-prose wrap-anywhere whitespace-pre-line">{document.notes}</p>
          </Section>
        )}
      </div>
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="What is asked">
          <Needs document={document} />
        </Section>
        <Section title="Where">
          <Setting brief={brief} />
        </Section>
        <Section title="Designs for it">
          {designs.length === 0 ? (
            <p className="text-graphite">No design yet.</p>
          ) : (
            <ul className="flex flex-col">
              {designs.map((design) => (
                <li key={design.id} className="border-b border-rule py-1.5">
                  <Link to={`/designs/${design.id}`} className="link">
                    <span className="font-mono">{design.number}</span> {design.title}
                  </Link>
                </li>
              ))}
            </ul>
          )}
          {startDesign}
        </Section>
      </div>
    </div>
  );
}
