/** Checks a draft as the server does, away from the page: solving a beam takes longer than a frame. */
import type { Written } from '@/features/review/draft';
import { readTemplate } from '@/features/review/read-template';
import type { Fault } from '@/lib/app-error';

export interface CheckRequest {
  readonly id: number;
  readonly document: Written;
}

export interface CheckAnswer {
  readonly id: number;
  readonly faults: readonly Fault[];
}

addEventListener('message', ({ data: { id, document } }: MessageEvent<CheckRequest>) => {
  const reading = readTemplate(document);
  postMessage({ id, faults: reading.ok ? [] : reading.faults } satisfies CheckAnswer);
});
