import type { AppContext } from '#backend/app-context.ts';
import type { Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import {
  claimSlot as claimSlotContract,
  releaseSlot as releaseSlotContract,
} from '#shared/contracts/slots.ts';
import type { SlotId } from '#shared/kernel/ids.ts';
import { claimSlot } from './claim-slot.ts';
import type { SlotSeen } from './claim-slot.ts';
import { releaseSlot } from './release-slot.ts';
import { presentSlot } from './slots.presenter.ts';

export function slotsRoutes(ctx: AppContext): Route[] {
  const present = ({ slot, crew, now }: SlotSeen) => presentSlot(slot, crew, now);
  return [
    route(claimSlotContract, 'slot.claim', async ({ actor, params }) =>
      present(await claimSlot(ctx, actor, params.slotId as SlotId)),
    ),
    route(releaseSlotContract, 'slot.release-own', async ({ actor, params }) =>
      present(await releaseSlot(ctx, actor, params.slotId as SlotId)),
    ),
  ];
}
