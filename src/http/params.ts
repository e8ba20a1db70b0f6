import { notFound } from '@/lib/app-error';

const UUID = /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** An identifier out of the path. What is no identifier is found nowhere (404). */
export function idParam(
  params: Readonly<Record<string, string | undefined>>,
  name: string,
  what: string,
): string {
  const value = params[name];
  if (value === undefined || !UUID.test(value)) throw notFound(what);
  return value;
}

/** A count out of the path, such as a revision's number. What is no count is found nowhere (404). */
export function numberParam(
  params: Readonly<Record<string, string | undefined>>,
  name: string,
  what: string,
): number {
  const value = params[name] ?? '';
  if (!/^[1-9]\d{0,8}$/.test(value)) throw notFound(what);
  return Number(value);
}
