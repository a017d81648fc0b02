import { computed, ref, shallowRef } from 'vue';
import { asProblem, type ApiProblem } from 'src/api/problem.ts';

/**
 * One form's sending: `run` sends once at a time, `errors` holds what the server said of each
 * field, `problem` the refusal as a whole. A refusal is kept here, not thrown.
 */
export function useApiForm<Result>(
  submit: () => Promise<Result>,
  options: { onDone?: (result: Result) => void | Promise<void> } = {},
) {
  const pending = ref(false);
  const problem = shallowRef<ApiProblem | null>(null);
  const errors = computed<Record<string, string | undefined>>(() => problem.value?.errors ?? {});

  async function run(): Promise<boolean> {
    if (pending.value) return false;
    pending.value = true;
    problem.value = null;
    try {
      const result = await submit();
      await options.onDone?.(result);
      return true;
    } catch (error) {
      problem.value = asProblem(error);
      return false;
    } finally {
      pending.value = false;
    }
  }

  const clear = () => {
    problem.value = null;
  };

  return { run, pending, problem, errors, clear };
}
