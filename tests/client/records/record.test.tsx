import { screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { ReleaseRecord } from '#contracts/records';
import { RecordSheet, utc } from '../../../src/features/records/record-sheet';
import { drawn } from '../../support/client-drawn';
import { briefDocument, digest, estimate, idOf, people, powerRequirement, run } from '../../support/client-samples';

const at = '2026-03-14T09:32:05.000Z';
const record = ReleaseRecord.parse({
  id: idOf(90),
  releaseNumber: 'REL-2026-001',
  designId: idOf(11),
  designNumber: 'FN-014',
  designTitle: 'Pump-side node, 49 Hz',
  letter: 'B',
  revisionId: idOf(10),
  state: 'released',
  releasedAt: at,
  releasedBy: people.reviewer,
  loadPower: 0.0013,
  digest,
  intact: true,
  recall: null,
  supersededBy: null,
  dossier: {
    releaseNumber: 'REL-2026-001',
    design: { number: 'FN-014', title: 'Pump-side node, 49 Hz', letter: 'B' },
    brief: { number: 'BR-031', version: 1, document: briefDocument },
    document: {},
    documentDigest: digest,
    estimate,
    authors: [people.designer],
    remarks: [],
    signatures: [
      {
        id: idOf(80),
        by: people.reviewer,
        at,
        event: 'release',
        meaning: 'I release this revision.',
        statement: 'Indoors only.',
        digest,
      },
    ],
    runs: [
      {
        id: run.id,
        number: run.number,
        state: 'signed',
        result: 'nonconforming',
        startedAt: at,
        startedBy: people.bench,
        closedAt: at,
        specimen: 'SN 0042',
        lines: [
          {
            requirement: powerRequirement,
            estimated: 0.0013,
            measured: 0.0009,
            readings: 2,
            margin: -0.0001,
            verdict: 'fails',
          },
        ],
        readings: [
          {
            id: idOf(50),
            requirementId: powerRequirement.id,
            quantity: 'loadPower',
            value: 0.0009,
            unit: 'mW',
            instrument: { id: idOf(31), number: 'IN-002', name: 'Power meter' },
            outOfCalibrationReason: 'The other one is away.',
            note: '',
            by: people.bench,
            at,
            struck: null,
          },
        ],
        statement: 'Measured at 49 Hz.',
      },
    ],
  },
});

describe('the sheet of a release', () => {
  it('says what, who, when and on which evidence', () => {
    drawn(<RecordSheet record={record} strip={null} />);
    const words = screen.getByRole('article').textContent ?? '';
    for (const part of [
      'REL-2026-001',
      '2026-03-14 09:32:05 UTC',
      'Bram Okafor',
      'Ilse Varga',
      'RUN-007',
      'SN 0042',
      'I release this revision.',
      digest,
    ])
      expect(words).toContain(part);
    expect(words).toContain('The other one is away.');
    expect(screen.getByText('fails')).toBeTruthy();
    expect(screen.getByText('intact')).toBeTruthy();
    expect(screen.queryByText('Recalled')).toBeNull();
  });

  it('puts a recall before everything else, and tells a record that is not intact', () => {
    const recalled = {
      ...record,
      state: 'recalled' as const,
      intact: false,
      recall: { by: people.reviewer, at, reason: 'Weak magnets in batch 12.' },
    };
    drawn(<RecordSheet record={recalled} strip={null} />);
    const [first] = screen.getAllByRole('note');
    expect(first?.textContent).toContain('Weak magnets in batch 12.');
    expect(screen.getByText('not intact')).toBeTruthy();
  });

  it('writes times as they were signed, whatever the reader’s zone', () => {
    expect(utc(at)).toBe('2026-03-14 09:32:05 UTC');
  });
});
