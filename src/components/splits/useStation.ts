import { ref, watch } from 'vue';

/** Where this device weighs, and with what. Nothing can be weighed before the division is known. */
export type Station = {
  name: string;
  scale: string;
  divisionMg: number | null;
  capacityMg: number | null;
};

const KEY = 'tarewell-station';
const none: Station = { name: '', scale: '', divisionMg: null, capacityMg: null };

function read(): Station {
  try {
    const kept: unknown = JSON.parse(sessionStorage.getItem(KEY) ?? 'null');
    return typeof kept === 'object' && kept !== null ? { ...none, ...kept } : { ...none };
  } catch {
    return { ...none };
  }
}

const station = ref<Station>(read());
watch(
  station,
  (now) => {
    try {
      sessionStorage.setItem(KEY, JSON.stringify(now));
    } catch {
      // A browser without storage asks again after a reload.
    }
  },
  { deep: true },
);

/** The station of this device, kept as long as its tab is. */
export const useStation = () => station;
