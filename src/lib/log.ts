type Fields = Readonly<Record<string, unknown>>;

const plain = (value: unknown): unknown =>
  value instanceof Error
    ? { name: value.name, message: value.message, stack: value.stack, cause: plain(value.cause) }
    : value;

/** One line of JSON on standard error, for whatever collects the process's output. */
function write(level: 'info' | 'error', message: string, fields: Fields): void {
  const line = Object.fromEntries(Object.entries(fields).map(([name, value]) => [name, plain(value)]));
  process.stderr.write(`${JSON.stringify({ at: new Date().toISOString(), level, message, ...line })}\n`);
}

export const log = {
  info: (message: string, fields: Fields = {}) => write('info', message, fields),
  error: (message: string, fields: Fields = {}) => write('error', message, fields),
};
