import { createTransport, type Transporter } from 'nodemailer';
import type { Sequelize } from 'sequelize';
import type { Clock } from '../clock';
import { defineWorkModels } from '../work';
import type { JobHandler } from '../jobs/runner';

/** Thrown where mail cannot be handed over: the job waits and is tried again. */
export class MailAway extends Error {}

/**
 * Hands one outbox row over by SMTP: at least once, with the Message-ID it was born with, so that a receiver can drop a
 * second copy. Without an SMTP server mail stays in the outbox.
 */
export function mailHandler(
  sequelize: Sequelize,
  clock: Clock,
  smtpUrl: string | undefined,
  sender: string,
): JobHandler {
  const { outbox } = defineWorkModels(sequelize);
  let transport: Transporter | undefined;
  return async (payload) => {
    const { outboxId } = payload as { outboxId: string };
    const row = (await outbox.findByPk(outboxId))?.get();
    if (!row || row.state === 'sent') return;
    const attempts = row.attempts + 1;
    try {
      if (!smtpUrl) throw new MailAway('No mail server is set (SMTP_URL).');
      transport ??= createTransport(smtpUrl);
      await transport.sendMail({
        from: sender,
        to: row.recipient,
        subject: row.subject,
        text: row.textBody,
        html: row.htmlBody,
        messageId: row.messageId,
      });
    } catch (error) {
      await outbox.update({ attempts, lastError: (error as Error).message }, { where: { id: outboxId } });
      throw error;
    }
    await outbox.update(
      { state: 'sent', attempts, lastError: null, sentAt: clock.now() },
      { where: { id: outboxId } },
    );
  };
}

/** Plain text and the same as HTML with everything escaped. */
export function mailBodies(
  paragraphs: readonly string[],
  link?: { readonly words: string; readonly url: string },
): { text: string; html: string } {
  const text = [...paragraphs, ...(link ? [`${link.words}: ${link.url}`] : [])].join('\n\n');
  const anchor = link ? `<p><a href="${escaped(link.url)}">${escaped(link.words)}</a></p>` : '';
  return { text, html: `${paragraphs.map((each) => `<p>${escaped(each)}</p>`).join('')}${anchor}` };
}

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}
