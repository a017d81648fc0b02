import { answerSums, type SumsRequest } from 'src/workers/answerSums.ts';
import type { SheetSums } from '#shared/domain/buys/sheetSums.ts';

export type SumsTask = { id: number; request: SumsRequest };
export type SumsAnswer = { id: number; sums: SheetSums } | { id: number; error: string };

const answer = (message: SumsAnswer) => postMessage(message);

addEventListener('message', ({ data: { id, request } }: MessageEvent<SumsTask>) => {
  answerSums(request).then(
    (sums) => answer({ id, sums }),
    (error: unknown) => answer({ id, error: String(error) }),
  );
});
