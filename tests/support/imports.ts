import { runImport } from '@/features/imports/work.server';
import { ask } from './app';

/** What a librarian says of a table that is new. */
export const ABOUT = {
  table: 'ottervane',
  name: 'Ottervane sections',
  reference: 'ST-90',
  supplier: 'Ottervane Section Works',
  standard: 'Works standard',
  source: 'Catalogue, issue 7',
  catalogue_date: '2026-11-02',
  licence: 'Kept by leave of the works.',
};

const SLUG = 'api/v1/section-imports';

/** The form that a file is sent as. */
export function formOf(content: BlobPart, name: string, type: string): FormData {
  const form = new FormData();
  form.set('file', new File([content], name, { type }));
  return form;
}
const ATTEMPT = { isLast: true };

/** Acts on imports over the interface as one person, and does the worker's part at once where it is asked for. */
export function importer(cookie: string, practiceId: string) {
  const act = async (method: string, id: string, step: string, json: object | undefined, version?: number) =>
    ask(method, `/${SLUG}/${id}${step}`, {
      cookie,
      ...(json && { json }),
      ...(version !== undefined && { headers: { 'if-match': `"${version}"` } }),
    });
  const work = (id: string) => runImport({ practiceId, runId: id }, ATTEMPT);
  const read = async (id: string) => (await act('GET', id, '', undefined)).json;
  return {
    act,
    work,
    read,
    upload: (content: BlobPart, name = 'table.csv', type = 'text/csv') =>
      ask('POST', `/${SLUG}`, { cookie, body: formOf(content, name, type) }),
    /** Says what the file is, and checks it. */
    check: async (id: string, answers: readonly object[], about: object = {}) => {
      const { version } = await read(id);
      const said = { about: { ...ABOUT, ...about }, answers, check: false };
      const mapped = await act('PUT', id, '/mapping', said, version);
      const asked = await act('POST', id, '/check', undefined, mapped.json.version);
      if (asked.status === 202) await work(id);
      return asked.status === 202 ? { ...asked, json: await read(id) } : asked;
    },
    /** Puts right what is given, and checks again. */
    fix: async (id: string, fixes: object) => {
      const { version } = await read(id);
      const asked = await act('POST', id, '/fixes', fixes, version);
      if (asked.status === 202) await work(id);
      return asked.status === 202 ? { ...asked, json: await read(id) } : asked;
    },
    commit: async (id: string, note = 'First issue.') => {
      const { version } = await read(id);
      const body = { change_note: note, change_class: 'improvement', consequence: 'service' };
      const asked = await act('POST', id, '/commit', body, version);
      if (asked.status === 202) await work(id);
      return asked.status === 202 ? { ...asked, json: await read(id) } : asked;
    },
  };
}

const HEADINGS = 'Name;h mm;b mm;tw mm;tf mm;r mm;G kg/m;A cm2;Iy cm4;Wel,y cm3;Wpl,y cm3;Iz cm4;It cm4';

/** Clean rows of the invented supplier: computed from the dimensions in jobmap §9. */
export const CLEAN = [
  'OV 180×90×18;178;90;5,0;7,6;8;17,6;22,4;1208;136;154;93;3,9',
  'OV 210×110×24;208;110;5,6;9,0;9;24,4;31,1;2342;225;254;200;7,4',
  'OV 260×130×32;258;130;6,2;9,8;10;32,3;41,1;4744;368;414;360;11,4',
  'OV 310×150×43;308;150;6,9;11,2;12;42,8;54,5;8985;583;657;631;19,7',
  'OV 360×165×53;358;165;7,6;12,4;12;53,0;67,5;14899;832;938;930;28,9',
];

/** The file of a supplier who writes decimal commas and letters of axes. */
export const csvOf = (rows: readonly string[]): string => `${[HEADINGS, ...rows].join('\r\n')}\r\n`;

export const EN = { kind: 'axes', value: 'en' };
