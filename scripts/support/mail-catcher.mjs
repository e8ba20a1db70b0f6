import { once } from 'node:events';
import { createServer } from 'node:http';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

const LOOPBACK = '127.0.0.1';
/** The oldest are forgotten. */
const KEPT = 2000;
/** No part of a message is made out of another. */
const AS_SENT = { skipHtmlToText: true, skipTextToHtml: true, skipImageLinks: true };

/**
 * A mail server on loopback that delivers nothing: it keeps what it is sent, for tests and for the demo, whose page asks
 * for it by HTTP. The sender waits for the hooks: for whom a message is, and the message before it is taken.
 * @param {{ onRecipient?: (address: string) => unknown, onMessage?: (message: Caught) => unknown }} hooks
 */
export async function startMailCatcher({ onRecipient, onMessage } = {}) {
  /** @type {Caught[]} */
  const messages = [];
  let count = 0;

  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    closeTimeout: 500,
    onRcptTo: ({ address }, _, callback) => answer(callback, () => onRecipient?.(address)),
    onData: (stream, session, callback) =>
      answer(callback, async () => {
        const message = toMessage(await simpleParser(stream, AS_SENT), session.envelope, count + 1);
        count += 1;
        messages.unshift(message);
        messages.length = Math.min(messages.length, KEPT);
        await onMessage?.(message);
      }),
  });
  // A sender that is killed resets its connection.
  smtp.on('error', () => undefined);
  smtp.listen(0, LOOPBACK);
  const pages = createServer((_, response) => {
    response.writeHead(200, { 'Content-Type': 'application/json; charset=utf-8' });
    response.end(JSON.stringify({ count, messages }));
  });
  pages.listen(0, LOOPBACK);
  await Promise.all([once(smtp.server, 'listening'), once(pages, 'listening')]);

  return {
    /** The newest first. */
    messages,
    smtpUrl: `smtp://${LOOPBACK}:${smtp.server.address().port}`,
    pagesUrl: `http://${LOOPBACK}:${pages.address().port}`,
    stop: async () => {
      pages.close();
      pages.closeAllConnections();
      await new Promise((resolve) => smtp.close(resolve));
    },
  };
}

const answer = async (callback, work) => {
  try {
    await work();
    callback();
  } catch (error) {
    callback(error);
  }
};

/** @typedef {ReturnType<typeof toMessage>} Caught */

const toMessage = (mail, envelope, id) => ({
  id,
  at: new Date().toISOString(),
  messageId: mail.messageId ?? '',
  from: plain(mail.from),
  to: plain(mail.to),
  recipients: envelope.rcptTo.map(({ address }) => address),
  subject: mail.subject ?? '',
  text: mail.text ?? '',
  html: mail.html || '',
});

/** Name and address, without the quotation marks of the header. */
const plain = (addresses) => (addresses?.text ?? '').replaceAll('"', '');
