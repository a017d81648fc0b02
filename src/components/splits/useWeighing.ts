import { bandMg, judgeWeighing } from '#shared/domain/splits/judgeWeighing.ts';
import type { Bag, Portion, SplitLine, SplitSheet } from '#shared/schemas/splits.ts';
import { computed, ref, watch } from 'vue';
import { sayScaleRefusal } from 'src/components/splits/scaleWords.ts';
import { useStation } from 'src/components/splits/useStation.ts';
import { makeDeviceId } from 'src/composables/deviceId.ts';
import { useApiForm } from 'src/composables/useApiForm.ts';
import { useFormat } from 'src/composables/useFormat.ts';
import type { SplitActs } from 'src/stores/splitActs.ts';

type Given = {
  sheet: () => SplitSheet;
  portion: () => Portion;
  line: () => SplitLine | undefined;
  bag: () => Bag | undefined;
  acts: SplitActs;
};

/** One portion on the scale: the reading, what to make of it, and keeping it exactly once. */
export function useWeighing({ sheet, portion, line, bag, acts }: Given) {
  const station = useStation();
  const format = useFormat();
  const readingMg = ref<number | null>(null);
  const lookedAgain = ref(false);
  // Made on the device: sending the same weighing twice counts once.
  let id = makeDeviceId();

  const stepMg = computed(() => line()?.stepMg ?? 1);
  const divisionMg = computed(() => station.value.divisionMg);
  const band = computed(() =>
    bandMg(portion().targetMg, divisionMg.value ?? 1, sheet().bandPermille),
  );
  const verdict = computed(() =>
    readingMg.value === null
      ? null
      : judgeWeighing({
          readingMg: readingMg.value,
          targetMg: portion().targetMg,
          bandMg: band.value,
          secondLook: lookedAgain.value,
        }),
  );
  const refusal = computed(() =>
    divisionMg.value === null
      ? { text: 'Say first which scale you weigh on.', cut: false }
      : sayScaleRefusal(
          { targetMg: portion().targetMg, stepMg: stepMg.value },
          { divisionMg: divisionMg.value, capacityMg: station.value.capacityMg },
          (mg) => format.value.mass(mg),
        ),
  );
  const ready = computed(
    () => verdict.value !== null && verdict.value.verdict !== 'above' && !refusal.value && !!bag(),
  );

  const form = useApiForm(async () => {
    const { divisionMg: division, capacityMg, name, scale } = station.value;
    const from = bag();
    if (readingMg.value === null || division === null || !from) return;
    const { id: portionId, targetMg, targetVersion } = portion();
    await acts.weigh({
      id,
      portionId,
      bagId: from.id,
      station: name,
      scale,
      divisionMg: division,
      capacityMg,
      readingMg: readingMg.value,
      secondLook: lookedAgain.value,
      targetMg,
      targetVersion,
    });
  });

  function begin() {
    readingMg.value = null;
    lookedAgain.value = false;
    id = makeDeviceId();
    form.clear();
  }

  watch(readingMg, () => {
    lookedAgain.value = false;
    // Another reading is another weighing; only the same one may be sent again.
    if (form.problem.value) id = makeDeviceId();
  });

  return { station, readingMg, lookedAgain, band, verdict, refusal, ready, begin, ...form };
}
