/** A designation as one part of an address: the slash of L4x4x1/4 as a fraction slash, which is read as the same. */
const designationSegment = (designation: string) => encodeURIComponent(designation.replaceAll('/', '\u2044'));

/** Every address of the product. No URL is spelled twice. */
export const paths = {
  home: '/',
  signIn: '/sign-in',
  signOut: '/sign-out',
  refused: '/refused',
  account: '/account',
  notices: '/notices',
  /** All that answers; with a kind, only of it. */
  search: (q: string, kind?: string) => `/search?${new URLSearchParams({ q, ...(kind && { kind }) })}`,
  searchPage: '/search',
  /** Of the demo: the e-mails that were caught. */
  demoMail: '/demo-mail',
  templates: '/templates',
  template: (slug: string) => `/templates/${encodeURIComponent(slug)}`,
  templateRevision: (slug: string, number: number) =>
    `/templates/${encodeURIComponent(slug)}/revisions/${number}`,
  templateDraft: (slug: string, number: number) => `/templates/${encodeURIComponent(slug)}/drafts/${number}`,
  /** What a template was proven by, on one sheet. */
  passport: (slug: string, number: number) =>
    `/templates/${encodeURIComponent(slug)}/revisions/${number}/passport`,
  comparison: (slug: string, from: number, to: number) =>
    `/templates/${encodeURIComponent(slug)}/compare?from=${from}&to=${to}`,
  library: '/library',
  libraryDocument: (kind: string, slug: string) => `/library/${kind}/${encodeURIComponent(slug)}`,
  /** Where a revision of any kind of document is reviewed. */
  review: (kind: string, slug: string, number: number) =>
    `/library/${kind}/${encodeURIComponent(slug)}/revisions/${number}`,
  /** Where it is withdrawn, with every use in view. */
  withdrawal: (kind: string, slug: string, number: number) =>
    `/library/${kind}/${encodeURIComponent(slug)}/revisions/${number}/withdraw`,
  libraryDraft: (kind: string, slug: string, number: number) =>
    `/library/${kind}/${encodeURIComponent(slug)}/drafts/${number}`,
  /** A draft as its JSON text, for what has no form of its own. */
  libraryDraftText: (kind: string, slug: string, number: number) =>
    `/library/${kind}/${encodeURIComponent(slug)}/drafts/${number}?as=text`,
  newDocument: '/library/new',
  newTemplate: '/library/new-template',
  imports: '/library/imports',
  import: (id: string) => `/library/imports/${encodeURIComponent(id)}`,
  /** What was found in a file and what became of it, for print. */
  importReport: (id: string) => `/library/imports/${encodeURIComponent(id)}/report`,
  recall: (id: string) => `/library/recalls/${encodeURIComponent(id)}`,
  request: (number: number) => `/library/requests/${number}`,
  /** The form for a request, with the screen that it is raised from. */
  newRequest: (from: string) => `/library/requests/new?from=${encodeURIComponent(from)}`,
  sections: '/sections',
  buildSection: '/sections/build',
  stock: '/sections/stock',
  stockList: (supplier: string) => `/sections/stock/${encodeURIComponent(supplier)}`,
  section: (table: string, designation: string) =>
    `/sections/${encodeURIComponent(table)}/${designationSegment(designation)}`,
  jobs: '/jobs',
  newJob: '/jobs/new',
  job: (number: string) => `/jobs/${encodeURIComponent(number)}`,
  /** Where a template's page sends its values: the job is chosen there. */
  newMemberOf: (template: string) => `/jobs/new-member?template=${encodeURIComponent(template)}`,
  newMember: (number: string) => `/jobs/${encodeURIComponent(number)}/members/new`,
  member: (number: string, mark: string) =>
    `/jobs/${encodeURIComponent(number)}/members/${encodeURIComponent(mark)}`,
  memberSheet: (number: string, mark: string) =>
    `/jobs/${encodeURIComponent(number)}/members/${encodeURIComponent(mark)}/sheet`,
  audit: '/audit',
  help: '/help',
  helpPage: (page: string) => `/help/${encodeURIComponent(page)}`,
  healthz: '/healthz',
  readyz: '/readyz',
  api: {
    me: '/api/v1/me',
    sectionColumns: '/api/v1/me/section-columns',
    events: '/api/v1/events',
    notices: '/api/v1/notices',
    readNotices: '/api/v1/notices/read',
    password: '/api/v1/me/password',
    session: '/api/v1/session',
    sessions: '/api/v1/sessions',
    sessionById: (id: string) => `/api/v1/sessions/${encodeURIComponent(id)}`,
    tokens: '/api/v1/tokens',
    tokenById: (id: string) => `/api/v1/tokens/${encodeURIComponent(id)}`,
    openapi: '/api/v1/openapi.json',
    solve: '/api/v1/beams/solve',
    drafts: (kind: string, slug: string) => `/api/v1/library/${kind}/${encodeURIComponent(slug)}/drafts`,
    draft: (kind: string, slug: string, number: number) =>
      `/api/v1/library/${kind}/${encodeURIComponent(slug)}/drafts/${number}`,
    templateRevision: (slug: string, number: number) =>
      `/api/v1/templates/${encodeURIComponent(slug)}/revisions/${number}`,
    revision: (kind: string, slug: string, number: number) =>
      `/api/v1/library/${kind}/${encodeURIComponent(slug)}/revisions/${number}`,
    recall: (id: string) => `/api/v1/recalls/${encodeURIComponent(id)}`,
    requests: '/api/v1/requests',
    request: (number: number) => `/api/v1/requests/${number}`,
    audit: '/api/v1/audit',
    auditExport: '/api/v1/audit/export',
    sections: '/api/v1/sections',
    sectionSpread: '/api/v1/sections/spread',
    savedSearches: '/api/v1/sections/searches',
    savedSearch: (id: string) => `/api/v1/sections/searches/${encodeURIComponent(id)}`,
    section: (table: string, designation: string) =>
      `/api/v1/sections/${encodeURIComponent(table)}/${designationSegment(designation)}`,
    stock: '/api/v1/stock',
    stockList: (supplier: string) => `/api/v1/stock/${encodeURIComponent(supplier)}`,
    stockLines: (supplier: string) => `/api/v1/stock/${encodeURIComponent(supplier)}/lines`,
    stockLine: (supplier: string, id: string) =>
      `/api/v1/stock/${encodeURIComponent(supplier)}/lines/${encodeURIComponent(id)}`,
    checkStock: (supplier: string) => `/api/v1/stock/${encodeURIComponent(supplier)}/check`,
    stockCsv: (supplier: string) => `/api/v1/stock/${encodeURIComponent(supplier)}/csv`,
    imports: '/api/v1/section-imports',
    import: (id: string) => `/api/v1/section-imports/${encodeURIComponent(id)}`,
    search: '/api/v1/search',
    jobs: '/api/v1/jobs',
    job: (number: string) => `/api/v1/jobs/${encodeURIComponent(number)}`,
    members: (number: string) => `/api/v1/jobs/${encodeURIComponent(number)}/members`,
    member: (number: string, mark: string) =>
      `/api/v1/jobs/${encodeURIComponent(number)}/members/${encodeURIComponent(mark)}`,
  },
} as const;

/** The sign-in page, and where to go from there. */
export const signInPath = (next: string): string =>
  next === paths.home ? paths.signIn : `${paths.signIn}?next=${encodeURIComponent(next)}`;

/** A path of our own to go on to, or home: never another site's, never the sign-in page again. */
export function localPath(next: string | null | undefined): string {
  const base = 'http://local.invalid';
  // A browser reads a backslash as a slash and drops control characters: both could lead to another site.
  if (!next?.startsWith('/') || /[\\\p{Cc}]/u.test(next) || !URL.canParse(next, base)) return paths.home;
  const url = new URL(next, base);
  if (url.origin !== base || url.pathname.startsWith('//') || url.pathname === paths.signIn)
    return paths.home;
  return url.pathname + url.search + url.hash;
}
