import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { PickupPerson } from '#shared/schemas/pickup.ts';
import { computed, ref, watch, type Ref } from 'vue';
import { containers, waitingOf } from 'src/components/pickup/pickupWords.ts';
import { useApiForm } from 'src/composables/useApiForm.ts';
import { useFormKey } from 'src/composables/useFormKey.ts';
import { notifyDone, notifyProblem } from 'src/composables/useNotify.ts';
import { usePickupStore } from 'src/stores/pickup.ts';

export type Collector = 'self' | 'proxy' | 'other';

/** One hand-over at the desk: what is ticked, who collects, and what still stands in the way. */
export function useHandover(
  open: Ref<boolean>,
  props: { club: string; head: BuyHeader; person: PickupPerson; pass: string | null },
) {
  const store = usePickupStore();
  const { key, renew } = useFormKey();
  const where = computed(() => ({ club: props.club, buy: props.head.id }));
  const ticked = ref<string[]>([]);
  const collector = ref<Collector>('self');
  const otherName = ref('');
  const legalName = ref('');

  const waits = computed(() => waitingOf(props.person));
  const chosen = computed(() => waits.value.filter(({ id }) => ticked.value.includes(id)));
  const papers = computed(() =>
    props.person.papersMissing.filter(({ saltId }) =>
      chosen.value.some((portion) => portion.saltId === saltId),
    ),
  );
  const recorded = computed(() => [
    ...new Set(
      chosen.value.map(({ salt }) => salt).filter((salt) => props.person.reportable.includes(salt)),
    ),
  ]);
  const asksLegalName = computed(() => recorded.value.length > 0 && !props.person.legalNameKnown);
  const owes = computed(() => !props.person.paid && props.person.vouchedBy === null);
  const collectedBy = computed(() => {
    if (collector.value === 'proxy') return props.person.proxyName ?? '';
    return collector.value === 'other' ? otherName.value.trim() : '';
  });
  /** What is still missing before it can be handed over; empty when nothing is. */
  const missing = computed(() => {
    if (owes.value) return 'First the payment, or somebody’s word for it.';
    if (chosen.value.length === 0) return 'Tick what you hand over.';
    if (papers.value.length > 0) return 'First the signed paper.';
    if (collector.value === 'other' && !otherName.value.trim()) return 'Write who collects.';
    return asksLegalName.value && !legalName.value.trim() ? 'Ask for the legal name.' : '';
  });

  const form = useApiForm(
    () =>
      store.handOver(where.value, {
        id: key.value,
        membershipId: props.person.membershipId,
        portionIds: chosen.value.map(({ id }) => id),
        method: props.pass ? 'pass' : 'name',
        pass: props.pass,
        collectedBy: collectedBy.value,
        legalName: asksLegalName.value ? legalName.value.trim() : null,
      }),
    {
      onDone: () => {
        const handover = key.value;
        open.value = false;
        const to = collectedBy.value || props.person.name;
        const receipt = props.person.isGuest ? '' : ` ${props.person.name} gets a receipt.`;
        notifyDone(`${containers(given)} handed to ${to}.${receipt}`, {
          undo: () => undo(handover),
        });
      },
    },
  );
  let given = 0;
  const handOver = () => {
    given = chosen.value.length;
    return form.run();
  };

  async function undo(handover: string) {
    try {
      await store.undo(where.value, handover);
      notifyDone('Taken back: the containers wait again.');
    } catch (error) {
      notifyProblem(error);
    }
  }

  watch(
    [open, () => props.person.membershipId],
    ([shown]) => {
      if (!shown) return;
      form.clear();
      renew();
      ticked.value = waits.value.map(({ id }) => id);
      collector.value = 'self';
      otherName.value = '';
      legalName.value = '';
    },
    { immediate: true },
  );
  // After a refusal others may have handed something over meanwhile: look again.
  watch(form.problem, (problem) => {
    if (problem?.status === 409) store.loadDesk(where.value).catch(() => undefined);
  });

  return {
    where,
    waits,
    ticked,
    chosen,
    collector,
    otherName,
    legalName,
    papers,
    recorded,
    asksLegalName,
    owes,
    missing,
    undo,
    handOver,
    pending: form.pending,
    problem: form.problem,
    errors: form.errors,
  };
}
