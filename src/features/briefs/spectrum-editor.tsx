import { ClipboardPaste, Plus, Trash2 } from 'lucide-react';
import { useState } from 'react';
import { useFieldArray, useWatch } from 'react-hook-form';
import type { Control } from 'react-hook-form';
import { formatCount } from '../../lib/format';
import { Button, IconButton } from '../../ui/button';
import { Dialog } from '../../ui/dialog';
import { FormField } from '../../ui/form';
import { QuantityField } from '../../ui/quantity-field';
import { Select } from '../../ui/select';
import { TextArea } from '../../ui/text-area';
import { TextField } from '../../ui/text-field';
import type { BriefFields } from './brief-fields';
import { readPastedPoints } from './vibration-document';
import { densityUnits, densityUnitWords, emptyPoint } from './vibration-fields';
import type { PointFields } from './vibration-fields';

const unitChoices = densityUnits.map((unit) => ({ value: unit, label: densityUnitWords[unit] }));

/** Points of a spectrum in a small table that can also be pasted, with the record that is drawn from it. */
export function SpectrumEditor({ control }: { control: Control<BriefFields> }) {
  const { fields, append, remove, replace } = useFieldArray({ control, name: 'vibration.spectrum.points' });
  const unit = useWatch({ control, name: 'vibration.spectrum.unit' });
  const [pasting, setPasting] = useState(false);
  return (
    <div className="flex flex-col gap-4">
      <div className="grid grid-cols-2 items-start gap-x-3 gap-y-3 sm:grid-cols-3">
        <FormField control={control} name="vibration.spectrum.unit">
          {(bind) => <Select label="Unit of density" choices={unitChoices} hint="One-sided, per hertz." {...bind} />}
        </FormField>
        <FormField control={control} name="vibration.spectrum.duration">
          {(bind) => (
            <QuantityField label="Length of the record" dimension="time" unit="s" least={0.01} most={3600} {...bind} />
          )}
        </FormField>
        <FormField control={control} name="vibration.spectrum.seed">
          {(bind) => (
            <TextField label="Seed" mono inputMode="numeric" hint="The same seed gives the same record." {...bind} />
          )}
        </FormField>
      </div>
      <table aria-label="Points of the spectrum" className="w-full max-w-xl">
        <thead>
          <tr className="text-left text-sm">
            <th scope="col" className="pb-1 font-semibold">
              Frequency <span className="font-normal text-graphite">/ Hz</span>
            </th>
            <th scope="col" className="pb-1 font-semibold">
              Density <span className="font-normal text-graphite">/ {densityUnitWords[unit]}</span>
            </th>
            <th scope="col">
              <span className="sr-only">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {fields.map((field, index) => (
            <tr key={field.id} className="align-top">
              <td className="w-1/2 pr-2 pb-1.5">
                <FormField control={control} name={`vibration.spectrum.points.${index}.frequency`}>
                  {(bind) => (
                    <QuantityField
                      label={`Frequency of point ${index + 1}`}
                      labelHidden
                      dimension="frequency"
                      unit="Hz"
                      least={1e-3}
                      most={1e5}
                      {...bind}
                    />
                  )}
                </FormField>
              </td>
              <td className="w-1/2 pr-1 pb-1.5">
                <FormField control={control} name={`vibration.spectrum.points.${index}.density`}>
                  {(bind) => (
                    <QuantityField
                      label={`Density of point ${index + 1}`}
                      labelHidden
                      dimension="accelerationDensity"
                      unit={densityUnitWords[unit]}
                      {...bind}
                    />
                  )}
                </FormField>
              </td>
              <td>
                <IconButton
                  icon={Trash2}
                  label={`Remove point ${index + 1}`}
                  size="small"
                  disabled={fields.length <= 2}
                  onPress={() => remove(index)}
                />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <div className="flex flex-wrap gap-2">
        <Button size="small" icon={Plus} onPress={() => append(emptyPoint())}>
          Add a point
        </Button>
        <Button size="small" icon={ClipboardPaste} onPress={() => setPasting(true)}>
          Paste a table
        </Button>
      </div>
      {pasting ? (
        <PasteDialog
          onClose={() => setPasting(false)}
          onPoints={(points) => {
            replace(points);
            setPasting(false);
          }}
        />
      ) : null}
    </div>
  );
}

function PasteDialog({ onClose, onPoints }: { onClose: () => void; onPoints: (points: PointFields[]) => void }) {
  const [text, setText] = useState('');
  const { points, skipped } = readPastedPoints(text);
  const enough = points.length >= 2;
  return (
    <Dialog
      title="Paste points of a spectrum"
      isOpen
      onClose={onClose}
      footer={
        <>
          <Button onPress={onClose}>Cancel</Button>
          <Button variant="primary" disabled={!enough} onPress={() => onPoints(points)}>
            {enough ? `Take ${formatCount(points.length, 'point')}` : 'Take the points'}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        <TextArea
          label="Frequency and density, one point a line"
          hint="Parted by a tab, a semicolon, spaces or a comma. They replace the points in the table."
          rows={8}
          autoFocus
          value={text}
          onChange={setText}
          error={text.trim() !== '' && !enough ? `At least two points are needed; ${points.length} found.` : undefined}
        />
        {skipped.length > 0 ? (
          <p className="text-graphite">
            Left out, since no two numbers stand there:{' '}
            {skipped
              .slice(0, 3)
              .map((line) => `“${line.slice(0, 40)}”`)
              .join(', ')}
            {skipped.length > 3 ? ` and ${skipped.length - 3} more` : ''}.
          </p>
        ) : null}
      </div>
    </Dialog>
  );
}
