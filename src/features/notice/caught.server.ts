import { z } from 'zod';

/** What the demo's mail catcher answers with: the newest message first. */
const Caught = z.object({
  count: z.int(),
  messages: z.array(
    z.object({
      id: z.int(),
      at: z.iso.datetime(),
      from: z.string(),
      to: z.string(),
      subject: z.string(),
      text: z.string(),
      html: z.string(),
    }),
  ),
});
export type Caught = z.output<typeof Caught>;

export async function readCaughtMail(url: string): Promise<Caught> {
  const response = await fetch(url, { signal: AbortSignal.timeout(5000) });
  return Caught.parse(await response.json());
}
