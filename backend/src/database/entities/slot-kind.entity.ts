import { EntitySchema } from 'typeorm';
import type { CompetencyId, SlotKindId } from '#shared/kernel/ids.ts';

/** What a slot is for: shore leader, back marker, pool guide and so on. */
export interface SlotKindRow {
  id: SlotKindId;
  name: string;
  position: number;
  isFor18AndOver: boolean;
}

/** A competency that a slot kind requires of sessions whose crew meets after `addedAt`. */
export interface SlotKindRequirementRow {
  slotKindId: SlotKindId;
  competencyId: CompetencyId;
  addedAt: Date;
}

export const SlotKindEntity = new EntitySchema<SlotKindRow>({
  name: 'slot_kind',
  columns: {
    id: { type: 'uuid', primary: true },
    name: { type: 'text' },
    position: { type: 'integer' },
    isFor18AndOver: { name: 'is_for_18_and_over', type: 'boolean' },
  },
});

export const SlotKindRequirementEntity = new EntitySchema<SlotKindRequirementRow>({
  name: 'slot_kind_requirement',
  columns: {
    slotKindId: { name: 'slot_kind_id', type: 'uuid', primary: true },
    competencyId: { name: 'competency_id', type: 'uuid', primary: true },
    addedAt: { name: 'added_at', type: 'timestamptz' },
  },
});
