import type { SheetSums } from '#shared/domain/buys/sheetSums.ts';
import type { SumsRequest } from 'src/workers/answerSums.ts';
import type { SumsAnswer, SumsTask } from 'src/workers/sheetSums.worker.ts';

type Waiting = { resolve: (sums: SheetSums) => void; reject: (error: Error) => void };

let worker: Worker | null = null;
let next = 1;
const waiting = new Map<number, Waiting>();

function start(): Worker {
  const made = new Worker(new URL('./sheetSums.worker.ts', import.meta.url), { type: 'module' });
  made.onmessage = ({ data }: MessageEvent<SumsAnswer>) => {
    const asked = waiting.get(data.id);
    waiting.delete(data.id);
    if ('sums' in data) asked?.resolve(data.sums);
    else asked?.reject(new Error(data.error));
  };
  made.onerror = () => {
    worker = null;
    waiting.forEach(({ reject }) => reject(new Error('The sums could not be made.')));
    waiting.clear();
  };
  return made;
}

/** The sheet's sums, off the page's own thread; where there are no workers, on it. */
export async function makeSums(request: SumsRequest): Promise<SheetSums> {
  if (typeof Worker === 'undefined') {
    const { answerSums } = await import('src/workers/answerSums.ts');
    return answerSums(request);
  }
  worker ??= start();
  const task: SumsTask = { id: next, request };
  next += 1;
  const answer = new Promise<SheetSums>((resolve, reject) => {
    waiting.set(task.id, { resolve, reject });
  });
  worker.postMessage(task);
  return answer;
}
