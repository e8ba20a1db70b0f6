import { readdir, readFile } from 'node:fs/promises';

/** The texts of data/<folder>, in the order of their names. */
export async function readShipped(folder: string, ending: string): Promise<string[]> {
  const url = new URL(`../../../data/${folder}/`, import.meta.url);
  const names = (await readdir(url)).filter((name) => name.endsWith(ending)).sort();
  return Promise.all(names.map((name) => readFile(new URL(name, url), 'utf8')));
}
