import {
  ChoiceField,
  DateField,
  FieldGroup,
  NumberField,
  TextField,
  TimeField,
} from '#frontend/components/field.tsx';
import { metres } from '#frontend/words/tide-words.ts';
import {
  PatternFields,
  PatternKind,
  PatternReadBack,
  usePatternReading,
} from './pattern-fields.tsx';
import type { FieldErrors, PlanDraft } from './plan-draft.ts';
import { atShore } from './plan-draft.ts';
import type { PlansView } from './seasons.queries.ts';

/** The fields of a plan: its pattern, the window round low water, what cuts it, and its slots. */
export function PlanForm(props: {
  readonly draft: PlanDraft;
  readonly errors: FieldErrors;
  readonly view: PlansView;
  readonly onChange: (draft: PlanDraft) => void;
}) {
  const { draft, errors, view, onChange } = props;
  const shore = view.shores.find(({ id }) => id === draft.shoreId);
  const pattern = usePatternReading(draft.pattern, draft.fromOn);
  const change = (changed: Partial<PlanDraft>): void => onChange({ ...draft, ...changed });
  return (
    <>
      <FieldGroup legend="Pattern">
        <TextField
          label="Name, also of its sessions"
          value={draft.name}
          error={errors.name}
          onChange={(name) => change({ name })}
        />
        <div className="grid grid-cols-2 items-end gap-3">
          <ChoiceField
            label="Shore"
            value={draft.shoreId}
            error={errors.shoreId}
            choices={view.shores.map(({ id, name }) => ({ value: id, words: name }))}
            onChange={(id) => {
              const next = view.shores.find((one) => one.id === id);
              if (next !== undefined) onChange(atShore(draft, shore, next));
            }}
          />
          <PatternKind draft={draft.pattern} onChange={(changed) => change({ pattern: changed })} />
        </div>
        <PatternFields
          draft={draft.pattern}
          error={errors.pattern ?? pattern.error}
          onChange={(changed) => change({ pattern: changed })}
        />
        <div className="grid grid-cols-2 items-start gap-3">
          <DateField
            label="From"
            value={draft.fromOn}
            error={errors.fromOn}
            onChange={(fromOn) => change({ fromOn })}
          />
          <DateField
            label="To"
            value={draft.toOn}
            error={errors.toOn}
            min={draft.fromOn}
            onChange={(toOn) => change({ toOn })}
          />
        </div>
        <PatternReadBack readBack={pattern.readBack} />
      </FieldGroup>
      <FieldGroup legend="Working window">
        <div className="grid grid-cols-2 items-start gap-3">
          <NumberField
            label="Before low water"
            unit="h"
            keys="text"
            value={draft.beforeLow}
            error={errors.minutesBeforeLow}
            onChange={(beforeLow) => change({ beforeLow })}
          />
          <NumberField
            label="After low water"
            unit="h"
            keys="text"
            value={draft.afterLow}
            error={errors.minutesAfterLow}
            onChange={(afterLow) => change({ afterLow })}
          />
        </div>
        <p className="text-sm text-barnacle">
          The lower shore is clear by low water; everyone is off when the window ends. A plan may
          narrow what its shore allows; asking for more changes nothing.
        </p>
      </FieldGroup>
      <FieldGroup legend="Rules that cut it">
        <div className="grid grid-cols-2 items-start gap-3">
          <TimeField
            label="On the shore from"
            value={draft.earliestClock}
            error={errors.earliestClock}
            onChange={(earliestClock) => change({ earliestClock })}
          />
          <TimeField
            label="Off the shore by"
            value={draft.latestClock}
            error={errors.latestClock}
            onChange={(latestClock) => change({ latestClock })}
          />
        </div>
        <div className="grid grid-cols-2 items-start gap-3">
          <NumberField
            label="Low water up to"
            unit="m"
            value={draft.lowestLevel}
            error={errors.lowestLevelM}
            onChange={(lowestLevel) => change({ lowestLevel })}
          />
          <NumberField
            label="No shorter than"
            unit="h"
            keys="text"
            value={draft.shortest}
            error={errors.minimumMinutes}
            onChange={(shortest) => change({ shortest })}
          />
        </div>
        <NumberField
          label="In daylight, away from the dark by"
          unit="min"
          keys="numeric"
          value={draft.daylightMargin}
          error={errors.daylightMarginMinutes}
          onChange={(daylightMargin) => change({ daylightMargin })}
        />
        {shore !== undefined && draft.lowestLevel.trim() === '' && (
          <p className="text-sm text-barnacle">
            {`Low water up to ${metres(shore.workingLevelM)} m, as at ${shore.name}.`}
          </p>
        )}
      </FieldGroup>
      <SlotFields {...props} />
    </>
  );
}

function SlotFields(props: Parameters<typeof PlanForm>[0]) {
  const { draft, errors, view, onChange } = props;
  const nameOf = (id: string): string => view.slotKinds.find((kind) => kind.id === id)?.name ?? '';
  return (
    <FieldGroup legend="Slots">
      <div className="grid grid-cols-3 items-end gap-2.5">
        {draft.slots.map(({ slotKindId, count }) => (
          <NumberField
            key={slotKindId}
            label={nameOf(slotKindId)}
            keys="numeric"
            value={count}
            onChange={(changed) =>
              onChange({
                ...draft,
                slots: draft.slots.map((slot) =>
                  slot.slotKindId === slotKindId ? { slotKindId, count: changed } : slot,
                ),
              })
            }
          />
        ))}
      </div>
      {errors.slots !== undefined && (
        <p className="text-sm font-medium text-anemone" role="alert">
          {errors.slots}
        </p>
      )}
    </FieldGroup>
  );
}
