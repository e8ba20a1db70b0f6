import { paths } from '@/paths';
import { LIVE } from './live';

/** Milliseconds until a stream that was refused is asked for again; doubled each time. */
const RETRY = { first: 15_000, most: 600_000 };

type Message = readonly [name: keyof typeof LIVE, data: unknown];

const unreadListeners = new Set<(unread: number) => void>();
const progressListeners = new Set<(id: string | null) => void>();

const subscribe = <L>(listeners: Set<L>, listener: L): (() => void) => {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
};

/** Called with the number of unread notices, at the start and whenever it changes. */
export const onUnread = (listener: (unread: number) => void) => subscribe(unreadListeners, listener);

/** Called with the id of a run that has come further; with null when messages may have been missed: read again. */
export const onProgress = (listener: (id: string | null) => void) => subscribe(progressListeners, listener);

/** A field of a message's data. */
const fieldOf = (data: unknown, name: string): unknown =>
  typeof data === 'object' && data !== null ? Reflect.get(data, name) : undefined;

function hear([name, data]: Message): void {
  if (name === LIVE.progress) {
    const id = fieldOf(data, 'id');
    if (typeof id === 'string') for (const listener of progressListeners) listener(id);
    return;
  }
  // The number comes first on every stream: what came before it on another one may be missed.
  const unread = fieldOf(data, 'unread');
  if (typeof unread === 'number') for (const listener of unreadListeners) listener(unread);
}

/**
 * Keeps the person's pages of this browser up to date by one stream for all of them: a browser has few connections to
 * a server. Whichever page holds the lock holds the stream and passes on what it hears.
 */
export function keepLive(person: string): void {
  let stop = start(person);
  // A page that is kept for Back must hold neither; it takes part again when it is shown.
  addEventListener('pagehide', () => stop());
  addEventListener('pageshow', ({ persisted }) => {
    if (persisted) stop = start(person);
  });
}

function start(person: string): () => void {
  const name = `putlog-live-${person}`;
  const stopping = new AbortController();
  const channel = new BroadcastChannel(name);
  channel.onmessage = ({ data }: MessageEvent<Message | null>) => (data ? hear(data) : missed());
  const tell = (message: Message | null) => {
    if (message) hear(message);
    else missed();
    channel.postMessage(message);
  };
  const hold = () => holdStream(tell, stopping.signal);
  // Only where the page came over https or from this machine are there locks.
  if (navigator.locks) navigator.locks.request(name, { signal: stopping.signal }, hold).catch(unlessStopped);
  else void hold();
  return () => {
    stopping.abort();
    channel.close();
  };
}

function missed(): void {
  for (const listener of progressListeners) listener(null);
}

function unlessStopped(error: unknown): void {
  if (!(error instanceof DOMException && error.name === 'AbortError')) throw error;
}

/** Holds a stream until it is stopped; the browser opens it again when it breaks, and we when it was refused. */
function holdStream(tell: (message: Message | null) => void, stopping: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    let wait = RETRY.first;
    let timer: ReturnType<typeof setTimeout>;
    let source: EventSource;
    const open = () => {
      source = new EventSource(paths.api.events);
      source.onopen = () => {
        wait = RETRY.first;
        tell(null);
      };
      for (const name of Object.values(LIVE))
        source.addEventListener(name, ({ data }) => tell([name, JSON.parse(data)]));
      source.onerror = () => {
        if (source.readyState !== EventSource.CLOSED) return;
        timer = setTimeout(open, wait);
        wait = Math.min(wait * 2, RETRY.most);
      };
    };
    open();
    stopping.addEventListener('abort', () => {
      clearTimeout(timer);
      source.close();
      resolve();
    });
  });
}
