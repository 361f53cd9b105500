import { ChoiceField, NumberField, TextArea, TextField } from '#frontend/components/field.tsx';
import { RadioList } from '#frontend/components/radio-list.tsx';
import type { Reply } from '#frontend/api/call.ts';
import { FilePicker } from './file-picker.tsx';
import type { TableDraft, TableErrors } from './table-draft.ts';

export type Stations = Reply<'seeTables'>['stations'];

const zoneKinds = ['local', 'utc', 'fixed'] as const;
const unitChoices = [
  { value: '', words: 'As the table shows' },
  { value: 'm', words: 'Metres' },
  { value: 'cm', words: 'Centimetres' },
  { value: 'ft', words: 'Feet' },
] as const;
const orderChoices = [
  { value: '', words: 'As the table shows' },
  { value: 'day-first', words: 'Day, then month' },
  { value: 'month-first', words: 'Month, then day' },
] as const;

/** What is said of a table, and its text from a file or pasted. */
export function TableFields(props: {
  readonly draft: TableDraft;
  readonly errors: TableErrors;
  readonly stations: Stations;
  readonly onWrite: (changes: Partial<TableDraft>) => void;
}) {
  const { draft, errors, stations, onWrite } = props;
  const station = stations.find(({ id }) => id === draft.stationId);
  return (
    <div className="mt-3 grid max-w-letter gap-4">
      <div className="grid gap-4">
        <ChoiceField
          label="Tide station"
          value={draft.stationId}
          error={errors.stationId}
          choices={[
            { value: '', words: 'Choose a tide station' },
            ...stations.map(({ id, name, shoreNames }) => ({
              value: id,
              words: `${name}, for ${shoreNames.join(', ')}`,
            })),
          ]}
          onChange={(stationId) => onWrite({ stationId })}
        />
        <TextField
          label="What the table is called"
          value={draft.name}
          error={errors.name}
          placeholder="Harbour tide tables 2027"
          onChange={(name) => onWrite({ name })}
        />
      </div>
      <RadioList
        label="Which clock its times are printed in"
        hint="Look at the foot of the printed page. An hour wrong here is an hour wrong on the shore."
        value={draft.zoneKind}
        error={errors.zone}
        choices={[
          {
            value: 'local',
            words: `Local clock time, with summer time${station === undefined ? '' : ` (${station.zone})`}`,
          },
          { value: 'utc', words: 'UTC all year' },
          { value: 'fixed', words: 'Another fixed offset from UTC all year' },
        ]}
        onChange={(value) => onWrite({ zoneKind: zoneKinds.find((kind) => kind === value) ?? '' })}
      />
      {draft.zoneKind === 'fixed' && (
        <div className="w-44">
          <TextField
            label="Offset from UTC"
            value={draft.offset}
            error={errors.zone}
            placeholder="+01:00"
            onChange={(offset) => onWrite({ offset })}
          />
        </div>
      )}
      <div className="grid items-start gap-4 wide:grid-cols-3">
        <ChoiceField
          label="Heights in"
          value={draft.units}
          error={errors.units}
          choices={unitChoices}
          onChange={(value) =>
            onWrite({ units: unitChoices.find((one) => one.value === value)?.value ?? '' })
          }
        />
        <ChoiceField
          label="Dates with"
          value={draft.dateOrder}
          error={errors.dateOrder}
          choices={orderChoices}
          onChange={(value) =>
            onWrite({ dateOrder: orderChoices.find((one) => one.value === value)?.value ?? '' })
          }
        />
        <NumberField
          label="Year, if the dates have none"
          keys="numeric"
          value={draft.year}
          error={errors.year}
          onChange={(year) => onWrite({ year })}
        />
      </div>
      <FilePicker onRead={(text) => onWrite({ text })} />
      <TextArea
        label="The table"
        hint="From the file, or pasted: one row for each high or low water, or several of a day in a row."
        rows={10}
        value={draft.text}
        error={errors.text}
        onChange={(text) => onWrite({ text })}
      />
    </div>
  );
}
