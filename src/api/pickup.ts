import type {
  HandoverBody,
  MyPickup,
  PickupDesk,
  PickupNoticeBody,
  PickupSlot,
  SlotBody,
} from '#shared/schemas/pickup.ts';
import { api } from 'src/api/http.ts';
import type { BuyAt } from 'src/api/splits.ts';

const at = ({ club, buy }: BuyAt, rest: string) => `/clubs/${club}/buys/${buy}${rest}`;

export const getMyPickup = (where: BuyAt) => api.get<MyPickup>(at(where, '/pickup/mine'));
export const putMySlot = (where: BuyAt, slotId: string | null) =>
  api.put<MyPickup>(at(where, '/pickup/mine/slot'), { slotId });
export const putMyProxy = (where: BuyAt, name: string | null) =>
  api.put<MyPickup>(at(where, '/pickup/mine/proxy'), { name });

export const getDesk = (where: BuyAt) => api.get<PickupDesk>(at(where, '/pickup'));
export const postPass = (where: BuyAt, pass: string) =>
  api.post<{ membershipId: string }>(at(where, '/pickup/pass'), { pass });
export const postHandover = (where: BuyAt, body: HandoverBody) =>
  api.post<PickupDesk>(at(where, '/handovers'), body);
export const deleteHandover = (where: BuyAt, handover: string) =>
  api.del<PickupDesk>(at(where, `/handovers/${handover}`));

export const postSlot = (where: BuyAt, body: SlotBody) =>
  api.post<PickupSlot[]>(at(where, '/pickup/slots'), body);
export const putSlot = (where: BuyAt, slot: string, body: SlotBody) =>
  api.put<PickupSlot[]>(at(where, `/pickup/slots/${slot}`), body);
export const deleteSlot = (where: BuyAt, slot: string) =>
  api.del<PickupSlot[]>(at(where, `/pickup/slots/${slot}`));

export const postPickupNotice = (where: BuyAt, body: PickupNoticeBody) =>
  api.post<{ told: number }>(at(where, '/pickup/notices'), body);
export const postPickupReminder = (where: BuyAt, member: string) =>
  api.post<PickupDesk>(at(where, `/pickup/members/${member}/reminders`));
export const postUnclaimed = (where: BuyAt, member: string) =>
  api.post<PickupDesk>(at(where, `/pickup/members/${member}/unclaimed`));
