import { onMounted, onScopeDispose, ref, type ShallowRef } from 'vue';

const ROUNDING_PX = 1;

/** How many pixels lie out of sight to the left (`before`) and right (`after`) of a grid that scrolls sideways. */
export function useScrollEdges(box: Readonly<ShallowRef<HTMLElement | null>>) {
  const before = ref(0);
  const after = ref(0);
  const whole = (px: number) => (px > ROUNDING_PX ? px : 0);

  function look() {
    const now = box.value;
    if (!now) return;
    before.value = whole(now.scrollLeft);
    after.value = whole(now.scrollWidth - now.clientWidth - now.scrollLeft);
  }

  let observer: ResizeObserver | undefined;
  onMounted(() => {
    if (!box.value || typeof ResizeObserver === 'undefined') return;
    box.value.addEventListener('scroll', look, { passive: true });
    // The box changes with the window, its rows with the columns.
    observer = new ResizeObserver(look);
    observer.observe(box.value);
    const row = box.value.querySelector('[role="row"]');
    if (row) observer.observe(row);
  });
  onScopeDispose(() => observer?.disconnect());

  /** Scrolls sideways until a part stands clear of the columns of these widths that stick to both ends. */
  function reveal(part: HTMLElement, stuck: { left: number; right: number }) {
    if (!box.value) return;
    const room = box.value.getBoundingClientRect();
    const { left, right } = part.getBoundingClientRect();
    const over = right - (room.right - stuck.right);
    const under = room.left + stuck.left - left;
    if (over > 0) box.value.scrollLeft += over;
    else if (under > 0) box.value.scrollLeft -= under;
  }

  return { before, after, reveal };
}
