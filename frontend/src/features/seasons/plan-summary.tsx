import type { PlanPreview, PlanSettings } from '#shared/contracts/season-plans.ts';
import { counted } from '#frontend/words/number-words.ts';
import { rulesInWords } from './plan-words.ts';
import type { PlansView } from './seasons.queries.ts';

/** The rules of a plan in words, where they are not being changed. */
export function PlanSummary(props: {
  readonly settings: PlanSettings;
  readonly preview: PlanPreview;
  readonly view: PlansView;
}) {
  const { settings, preview, view } = props;
  const rules = rulesInWords(settings, {
    shore: view.shores.find(({ id }) => id === settings.shoreId)?.name ?? '',
    sentence: preview.sentence,
    slots: view.slotKinds.flatMap(({ id, name }) => {
      const count = settings.slots.find(({ slotKindId }) => slotKindId === id)?.count ?? 0;
      const one = name.toLowerCase();
      return count === 0 ? [] : [counted(count, one)];
    }),
  });
  return (
    <dl className="mt-3 border-t-[1.5px] border-ink text-ui">
      {rules.map(({ name, words }) => (
        <div key={name} className="grid grid-cols-[4.75rem_1fr] border-b border-hair py-1.5">
          <dt className="text-barnacle">{name}</dt>
          <dd>{words}</dd>
        </div>
      ))}
    </dl>
  );
}
