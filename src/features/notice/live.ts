/** Names of the messages of GET /api/v1/events; the data of each is JSON. */
export const LIVE = { unread: 'unread', progress: 'progress' } as const;

/** `unread`: sent at the start, and whenever the person's notices change. */
export interface Unread {
  readonly unread: number;
}
/** `progress`: a run has come further; what it has come to is read at its own address. */
export interface Progress {
  readonly id: string;
}

/** One message as server-sent events write it. */
export const liveMessage = (event: keyof typeof LIVE, data: Unread | Progress): string =>
  `event: ${LIVE[event]}\ndata: ${JSON.stringify(data)}\n\n`;
