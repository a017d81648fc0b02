import { scaleRefusal } from '#shared/domain/splits/scaleFits.ts';

type Asked = { targetMg: number; stepMg: number };
type Scale = { divisionMg: number; capacityMg: number | null };

/** Why this scale can't weigh a portion, and what to do; null when it can. `cut`: cutting helps. */
export function sayScaleRefusal(
  asked: Asked,
  scale: Scale,
  mass: (mg: number) => string,
): { text: string; cut: boolean } | null {
  const refusal = scaleRefusal(asked, scale);
  if (refusal === null) return null;
  switch (refusal.code) {
    case 'too_heavy':
      return {
        text: `It is more than your scale carries (${mass(refusal.capacityMg)}). Cut it into parts.`,
        cut: true,
      };
    case 'too_coarse':
      return {
        text: `This salt is weighed in steps of ${mass(asked.stepMg)}. It needs a scale that shows ${mass(refusal.needsDivisionMg)} or less.`,
        cut: false,
      };
    case 'too_small':
      return {
        text: `It is under 20 steps of your scale. It needs one that shows ${mass(refusal.needsDivisionMg)} or less.`,
        cut: false,
      };
  }
}
