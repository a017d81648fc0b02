import { Notify } from 'quasar';
import { asProblem } from 'src/api/problem.ts';

const UNDO_MS = 10_000;
const MOST = 2;

/** Notes that may still stand, oldest first. */
const standing: (() => void)[] = [];

/** Whoever weighs or hands over makes a note every few seconds: they mustn't pile up over the next button. */
function makeRoom(dismiss: () => void) {
  standing.push(dismiss);
  while (standing.length > MOST) standing.shift()?.();
}

/** Says that something is done; with `undo`, for ten seconds, how to take it back. */
export function notifyDone(text: string, options: { undo?: () => unknown } = {}) {
  const { undo } = options;
  const note = Notify.create({
    message: text,
    timeout: undo ? UNDO_MS : 4_000,
    ...(undo ? { actions: [{ label: 'Undo', handler: () => void undo() }] } : {}),
  });
  makeRoom(() => note());
}

/** Says what was refused, for acts without a form to say it in. */
export function notifyProblem(error: unknown) {
  const problem = asProblem(error);
  if (problem.code === 'signed_out') return;
  const caption = problem.detail === problem.title ? {} : { caption: problem.detail };
  Notify.create({ type: 'negative', message: problem.title, ...caption, timeout: 8_000 });
}
