import { z } from 'zod';
import { paths } from '@/paths';
import { MailData } from './notice';
import type { MailMode, NoticeKind } from './terms';

/** What a row of the outbox holds for its message. */
export const MailContent = MailData.extend({
  title: z.string(),
  detail: z.string(),
  href: z.string(),
}).strip();
export type MailContent = z.output<typeof MailContent>;

export interface MailItem {
  readonly kind: NoticeKind;
  readonly content: MailContent;
}

interface Circumstances {
  /** Where people reach the product. */
  readonly origin: string;
  readonly practice: string;
  readonly mode: MailMode;
}

export interface Composed {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

/** Subjects name a library document at most: never a job, a member or a figure. */
const SUBJECTS: Readonly<Record<NoticeKind, (reference: string) => string>> = {
  recall: (reference) => `Recalled: ${reference}. Your decision is needed`,
  withdrawn: (reference) => `Withdrawn: ${reference}`,
  issued: (reference) => `Issued: ${reference}`,
  submitted: (reference) => `For review: ${reference}`,
  returned: (reference) => `Returned to you: ${reference}`,
  commented: (reference) => `Comment on ${reference}`,
  review_due: (reference) => `Review is due: ${reference}`,
  request: (reference) => `Request about ${reference}`,
};

/** What the button to the item says. */
const OPENS: Readonly<Record<NoticeKind, string>> = {
  recall: 'Open the recall and decide',
  withdrawn: 'Open the document',
  issued: 'Open the revision',
  submitted: 'Open the review',
  returned: 'Open the draft',
  commented: 'Open the comment',
  review_due: 'Open the document',
  request: 'Open the request',
};

/** The message of one notice, or of a digest's notices. */
export function composeMail(items: readonly MailItem[], circumstances: Circumstances): Composed {
  const subject = subjectOf(items, circumstances.mode);
  return {
    subject,
    text: toText(items, circumstances),
    html: toHtml(subject, items, circumstances),
  };
}

function subjectOf(items: readonly MailItem[], mode: MailMode): string {
  const [first] = items;
  if (!first) throw new RangeError('A message has at least one item');
  if (mode === 'digest') return items.length === 1 ? 'Putlog: one notice' : `Putlog: ${items.length} notices`;
  return SUBJECTS[first.kind](first.content.reference ?? 'a library document');
}

/** Who sends it, and what can be done about it. */
const footOf = ({ mode, practice }: Circumstances, items: readonly MailItem[]): string =>
  items.some(({ kind }) => kind === 'recall')
    ? `Sent to you by ${practice}’s Putlog. A recall always comes at once and cannot be turned off. Other e-mails:`
    : `Sent to you by ${practice}’s Putlog, ${mode === 'digest' ? 'once a day' : 'at once'}. Choose your e-mails:`;

const choicesAt = ({ origin }: Circumstances): string => `${origin}${paths.account}#e-mail`;

function toText(items: readonly MailItem[], circumstances: Circumstances): string {
  const blocks = items.map(({ kind, content: { title, detail, facts = [], href } }) =>
    [
      title,
      ...(detail ? [detail] : []),
      ...facts.map(({ label, value }) => `${label}: ${value}`),
      '',
      `${OPENS[kind]}:`,
      circumstances.origin + href,
    ].join('\n'),
  );
  return `${[...blocks, `--\n${footOf(circumstances, items)}\n${choicesAt(circumstances)}`].join('\n\n')}\n`;
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const encode = (text: string): string => text.replaceAll(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);

/** The sheet's day colours, spelled out: mail programs know no variables. */
const COLOUR = {
  paper: '#faf8f3',
  ink: '#1c2321',
  ink2: '#454c48',
  rule: '#cfc9ba',
  wash: '#f6e3dc',
  error: '#9a2a18',
};
const FONT = "font-family:'Source Sans 3','Segoe UI',Helvetica,Arial,sans-serif";

const style = (...rules: string[]): string => `style="${rules.join(';')}"`;

const cell = (content: string, ...rules: string[]): string =>
  `<tr><td ${style('padding:14px 20px', ...rules)}>${content}</td></tr>`;

/** A sheet with a frame: who sends it in its head, what happened, the title block with the one action at the foot. */
function toHtml(subject: string, items: readonly MailItem[], circumstances: Circumstances): string {
  const { origin, practice } = circumstances;
  const rows = [
    cell(
      `<b>Putlog</b> <span ${style(`color:${COLOUR.ink2}`)}>${encode(practice)}</span>`,
      `border-bottom:1px solid ${COLOUR.ink}`,
    ),
    ...items.map((item) => toRow(item, origin)),
    cell(
      `${encode(footOf(circumstances, items))} <a href="${encode(choicesAt(circumstances))}" ${style(`color:${COLOUR.ink2}`)}>Account</a>`,
      `color:${COLOUR.ink2}`,
      'font-size:12px',
      'line-height:16px',
    ),
  ];
  return `<!doctype html>
<html lang="en-GB">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="color-scheme" content="light"><title>${encode(subject)}</title></head>
<body ${style('margin:0', 'padding:20px 10px', `background:${COLOUR.paper}`, `color:${COLOUR.ink}`)}>
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" ${style('max-width:600px', 'margin:0 auto', 'border-collapse:separate', 'border-spacing:0', `border:2px solid ${COLOUR.ink}`, `background:${COLOUR.paper}`, FONT, 'font-size:15px', 'line-height:22px')}>
${rows.join('\n')}
</table>
</body>
</html>
`;
}

function toRow({ kind, content }: MailItem, origin: string): string {
  const { title, detail, facts = [], href } = content;
  const grave = kind === 'recall' || kind === 'withdrawn';
  const parts = [
    `<h1 ${style('margin:0', 'font-size:20px', 'line-height:26px', 'font-weight:600', `color:${grave ? COLOUR.error : COLOUR.ink}`)}>${encode(title)}</h1>`,
    ...(detail ? [`<p ${style('margin:6px 0 0')}>${lines(detail)}</p>`] : []),
    ...(facts.length > 0 ? [toTable(facts)] : []),
    `<p ${style('margin:16px 0 4px')}><a href="${encode(origin + href)}" ${style('display:inline-block', `background:${COLOUR.ink}`, `color:${COLOUR.paper}`, 'padding:10px 16px', 'font-weight:600', 'text-decoration:none')}>${OPENS[kind]}</a></p>`,
  ];
  const edge = grave ? [`background:${COLOUR.wash}`, `border-left:8px solid ${COLOUR.error}`] : [];
  return cell(parts.join('\n'), `border-bottom:1px solid ${COLOUR.ink}`, ...edge);
}

const lines = (text: string): string => encode(text).replaceAll('\n', '<br>');

function toTable(facts: readonly { readonly label: string; readonly value: string }[]): string {
  const rule = `border-bottom:1px solid ${COLOUR.rule}`;
  const rows = facts.map(
    ({ label, value }) =>
      `<tr><th scope="row" align="left" valign="top" ${style('padding:5px 14px 5px 0', 'font-weight:400', `color:${COLOUR.ink2}`, rule)}>${encode(label)}</th><td valign="top" ${style('padding:5px 0', rule)}>${lines(value)}</td></tr>`,
  );
  return `<table cellpadding="0" cellspacing="0" width="100%" ${style('margin:12px 0 0', 'border-collapse:collapse', `border-top:2px solid ${COLOUR.ink}`, 'font-size:14px', 'line-height:20px')}>${rows.join('')}</table>`;
}
