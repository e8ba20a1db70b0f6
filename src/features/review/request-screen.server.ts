import { readMember } from '@/features/member/member.server';
import { readValues } from '@/features/template/address';
import { readTemplate } from '@/features/template/template.server';
import { AppError } from '@/lib/app-error';
import { LARGEST_CONTEXT } from './request';
import { queryOf, type RequestScreen, screenOf } from './request-screen';
import type { Actor } from './rows.server';

/**
 * What stands on the screen of an address, as its reader sees it: a template with all of its values, a member as it is
 * saved, a list with its filters. Of a page that is not there any more, its address alone.
 */
export async function readScreen(actor: Actor, address: string): Promise<RequestScreen> {
  const screen = { address, ...(await shownAt(actor, address)) };
  return JSON.stringify(screen).length <= LARGEST_CONTEXT ? screen : { address };
}

async function shownAt(actor: Actor, address: string): Promise<RequestScreen> {
  const screen = screenOf(address);
  const query = queryOf(address);
  try {
    if (screen.kind === 'template') return await templateAt(actor, screen, query);
    if (screen.kind === 'member') return await memberAt(actor, screen.job, screen.mark);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
  }
  return Object.keys(query).length > 0 ? { values: query } : {};
}

async function templateAt(
  actor: Actor,
  key: { readonly slug: string; readonly number: number | undefined },
  query: Record<string, string>,
): Promise<RequestScreen> {
  const { row, template } = await readTemplate(actor, key);
  const usual = template.parameters.map(({ symbol, default: value }) => [symbol, value] as const);
  return {
    template: { slug: row.slug, reference: row.reference, revision: row.revision },
    values: {
      ...Object.fromEntries(usual),
      ...query,
      ...readValues(template, new URLSearchParams(query)),
    },
  };
}

async function memberAt(actor: Actor, job: string, mark: string): Promise<RequestScreen> {
  const member = await readMember(actor, job, mark);
  const { template, section, criteria } = member;
  return {
    template: { slug: template.slug, reference: template.reference, revision: template.revision },
    member: {
      job: member.job,
      mark: member.mark,
      version: member.version,
      section: section && `${section.designation}, ${section.material}`,
      criteria: criteria && `${criteria.reference}, revision ${criteria.revision}`,
      fingerprint: member.fingerprint,
      engine_version: member.engine_version,
    },
    values: member.parameters,
  };
}
