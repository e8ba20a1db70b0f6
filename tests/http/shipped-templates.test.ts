import { beforeAll, expect, test } from 'vitest';
import { createApiToken } from '@/features/account/token.server';
import { evaluateAnswer } from '@/features/template/request';
import { ask } from '../support/app';
import { draftTemplate } from '../support/library';
import { foundPractice } from '../support/practice';
import { writtenTemplates } from '../support/templates';

let token: string;

beforeAll(async () => {
  const [author] = await foundPractice(['librarian', 'engineer']);
  for (const slug of writtenTemplates.keys()) await draftTemplate(author, slug);
  token = await createApiToken(author.email);
}, 60_000);

test.each([...writtenTemplates.keys()])(
  '%s is evaluated at its defaults, and its beam as a beam',
  async (slug) => {
    const { status, json } = await ask('POST', `/api/v1/templates/${slug}/evaluate`, {
      token,
      json: { parameters: {} },
    });
    expect(status, JSON.stringify(json)).toBe(200);
    const { template, beam, result, derivation, rules } = evaluateAnswer.parse(json);
    expect(template).toBe(slug);
    expect(derivation.length).toBeGreaterThan(2);
    expect(rules.filter(({ ok, severity }) => !ok && severity !== 'note')).toEqual([]);
    const solved = await ask('POST', '/api/v1/beams/solve', { token, json: beam });
    expect(solved.status).toBe(200);
    expect(solved.json.reactions).toEqual(result.reactions);
  },
);
