import type { OrderState } from '#shared/domain/orders/orderTypes.ts';
import type { ChipTone } from 'src/components/common/StateChip.vue';

/** How an order's state is shown. */
export const orderChips: Readonly<Record<OrderState, { label: string; tone: ChipTone }>> = {
  draft: { label: 'Not placed', tone: 'amber' },
  placed: { label: 'Placed', tone: 'slate' },
  confirmed: { label: 'Confirmed', tone: 'slate' },
  arrived: { label: 'Arrived', tone: 'moss' },
  short: { label: 'Arrived short', tone: 'amber' },
  failed: { label: 'Failed', tone: 'danger' },
};
