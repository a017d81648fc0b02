import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';
import { useFormat } from 'src/composables/useFormat.ts';

/** Today in the club's zone, YYYY-MM-DD. */
export function useClubToday(): () => string {
  const choices = useFormat();
  return () => format(new TZDate(Date.now(), choices.value.timeZone), 'yyyy-MM-dd');
}
