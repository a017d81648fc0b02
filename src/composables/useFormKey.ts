import { ref } from 'vue';
import { makeDeviceId } from 'src/composables/deviceId.ts';

/** The idempotency key of a form: the same for every try to send it, a new one each time it opens. */
export function useFormKey() {
  const key = ref(makeDeviceId());
  const renew = () => {
    key.value = makeDeviceId();
  };
  return { key, renew };
}
