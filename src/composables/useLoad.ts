import { ref, shallowRef, watch, type WatchSource } from 'vue';
import { asProblem, type ApiProblem } from 'src/api/problem.ts';

/** Runs a page's load at once and whenever `source` changes; only the newest run counts. */
export function useLoad(load: () => Promise<unknown>, source?: WatchSource | WatchSource[]) {
  const loading = ref(true);
  const problem = shallowRef<ApiProblem | null>(null);
  let newest = 0;

  async function reload() {
    const mine = ++newest;
    loading.value = true;
    problem.value = null;
    try {
      await load();
    } catch (error) {
      if (mine === newest) problem.value = asProblem(error);
    } finally {
      if (mine === newest) loading.value = false;
    }
  }

  if (source) watch(source, reload);
  void reload();
  return { loading, problem, reload };
}
