import { sheetSums, type SheetSums, type SheetSumsRequest } from '#shared/domain/buys/sheetSums.ts';

export type SumsTask = { id: number; request: SheetSumsRequest };
export type SumsAnswer = { id: number; sums: SheetSums } | { id: number; error: string };

const answer = (message: SumsAnswer) => postMessage(message);

addEventListener('message', ({ data: { id, request } }: MessageEvent<SumsTask>) => {
  try {
    answer({ id, sums: sheetSums(request) });
  } catch (error) {
    answer({ id, error: String(error) });
  }
});
