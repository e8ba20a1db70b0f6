import { readdir, readFile } from 'node:fs/promises';

const urlOf = (folder: string, file = '') => new URL(`../../../data/${folder}/${file}`, import.meta.url);

/** The slugs of the documents in data/<folder>, which are the names of their JSON files. */
export async function shippedSlugs(folder: string): Promise<string[]> {
  const names = await readdir(urlOf(folder));
  return names.flatMap((name) => (name.endsWith('.json') ? [name.slice(0, -'.json'.length)] : [])).sort();
}

export const readShipped = (folder: string, file: string): Promise<string> =>
  readFile(urlOf(folder, file), 'utf8');

export const readShippedJson = async (folder: string, slug: string): Promise<unknown> =>
  JSON.parse(await readShipped(folder, `${slug}.json`));
