/** Identifiers: UUID v4 as text, told apart by the kind of record that they name. */
declare const recordKind: unique symbol;
type Id<Kind extends string> = string & { readonly [recordKind]: Kind };

export type PersonId = Id<'person'>;
export type ShoreId = Id<'shore'>;
export type SessionId = Id<'session'>;
export type SlotId = Id<'slot'>;
export type SlotKindId = Id<'slot-kind'>;
export type CompetencyId = Id<'competency'>;
export type AwardId = Id<'award'>;
export type ClaimId = Id<'claim'>;
export type SeasonPlanId = Id<'season-plan'>;
export type TideTableId = Id<'tide-table'>;
export type LetterId = Id<'letter'>;
