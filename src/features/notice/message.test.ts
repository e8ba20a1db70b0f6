import { describe, expect, test } from 'vitest';
import { composeMail, type MailItem } from './message';
import { nextDigest, Preferences, USUAL_PREFERENCES } from './notice';
import { NOTICE_KINDS } from './terms';

const NEAR = { origin: 'https://putlog.fernhollow.example', practice: 'Fern & Hollow' } as const;

const item = (kind: MailItem['kind'], reference?: string): MailItem => ({
  kind,
  content: {
    title: 'LF4 in Q-2417 uses <Prop 3>',
    detail: 'Two lines:\nthe second.',
    href: '/jobs/Q-2417/members/LF4',
    ...(reference !== undefined && { reference }),
    facts: [{ label: 'Load', value: '12.5 kN/m & more' }],
  },
});

describe('a message', () => {
  test.each(NOTICE_KINDS)(
    'of the kind %s names the document in its subject, and nothing of the job',
    (kind) => {
      const { subject } = composeMail([item(kind, 'Prop 3')], { ...NEAR, mode: 'immediate' });
      expect(subject).toContain('Prop 3');
      expect(subject).not.toMatch(/LF4|2417|12\.5/);
      const { subject: unnamed } = composeMail([item(kind)], { ...NEAR, mode: 'immediate' });
      expect(unnamed).toContain('a library document');
    },
  );

  test('of a digest counts in its subject and has every item with its link', () => {
    const { subject, text, html } = composeMail([item('issued'), item('commented')], {
      ...NEAR,
      mode: 'digest',
    });
    expect(subject).toBe('Putlog: 2 notices');
    for (const part of [text, html])
      expect(part.split('https://putlog.fernhollow.example/jobs/Q-2417/members/LF4')).toHaveLength(3);
  });

  test('says as text what was said, and as HTML nothing that could be a tag', () => {
    const { text, html } = composeMail([item('recall')], { ...NEAR, mode: 'immediate' });
    expect(text).toContain('LF4 in Q-2417 uses <Prop 3>\nTwo lines:\nthe second.\nLoad: 12.5 kN/m & more');
    expect(html).toContain('LF4 in Q-2417 uses &lt;Prop 3&gt;');
    expect(html).toContain('Two lines:<br>the second.');
    expect(html).toContain('12.5 kN/m &amp; more');
    expect(html).toContain('Fern &amp; Hollow');
    expect(html).not.toContain('<Prop');
  });

  test('of a recall says that it cannot be turned off', () => {
    const parts = composeMail([item('recall')], { ...NEAR, mode: 'immediate' });
    for (const part of [parts.text, parts.html]) expect(part).toContain('cannot be turned off');
  });
});

test.each([
  ['2031-03-05T05:59:59Z', '2031-03-05T06:00:00.000Z'],
  ['2031-03-05T06:00:00Z', '2031-03-06T06:00:00.000Z'],
  ['2031-12-31T23:00:00Z', '2032-01-01T06:00:00.000Z'],
])('the digest after %s goes out at %s', (now, then) => {
  expect(nextDigest(new Date(now)).toISOString()).toBe(then);
});

test('every kind but the recall can be chosen', () => {
  expect(Object.keys(USUAL_PREFERENCES).sort()).toEqual(
    NOTICE_KINDS.filter((kind) => kind !== 'recall').sort(),
  );
  expect(Preferences.safeParse({ ...USUAL_PREFERENCES, recall: 'none' }).success).toBe(false);
});
