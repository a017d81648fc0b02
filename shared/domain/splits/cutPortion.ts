import type { Milligrams } from '../mass/milligrams.ts';

/**
 * Parts in which a share is weighed on a scale of this capacity: as few as will do, as equal as whole steps allow, the
 * larger first. One part when the capacity is unknown or suffices.
 *
 * @param stepMg step of the line; a part is a whole number of steps, only the last may carry what is no step
 * @throws RangeError when one step is above the capacity
 */
export function cutPortion(
  targetMg: Milligrams,
  stepMg: Milligrams,
  capacityMg: Milligrams | null,
): Milligrams[] {
  if (capacityMg === null || targetMg <= capacityMg) return [targetMg];
  const stepsThatFit = Math.floor(capacityMg / stepMg);
  if (stepsThatFit < 1) throw new RangeError('capacityMg is below one step');
  const steps = Math.floor(targetMg / stepMg);
  const rest = targetMg - steps * stepMg;
  const parts = Math.max(Math.ceil(steps / stepsThatFit), Math.ceil(targetMg / capacityMg));
  const base = Math.floor(steps / parts);
  const larger = steps - base * parts;
  const masses = Array.from(
    { length: parts },
    (_, index) => (base + (index < larger ? 1 : 0)) * stepMg,
  );
  if (rest === 0) return masses;
  const last = masses.at(-1) ?? 0;
  return last + rest <= capacityMg ? [...masses.slice(0, -1), last + rest] : [...masses, rest];
}
