import { randomBytes } from 'node:crypto';
import { mkdirSync, renameSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** Catches all mail on this machine and writes each as JSON into a folder, where the demonstration's mail page reads it. */
const [folder, port] = process.argv.slice(2);
mkdirSync(folder, { recursive: true, mode: 0o700 });

const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS', 'AUTH'],
  onData(stream, session, done) {
    simpleParser(stream).then((mail) => {
      const receivedAt = new Date().toISOString();
      const id = `${receivedAt.replace(/[^0-9]/g, '')}-${randomBytes(4).toString('hex')}`;
      const kept = {
        id,
        from: mail.from?.text ?? '',
        to: session.envelope.rcptTo.map((each) => each.address),
        subject: mail.subject ?? '',
        text: mail.text ?? '',
        html: mail.html || '',
        receivedAt,
      };
      const path = join(folder, `${id}.json`);
      writeFileSync(`${path}.part`, JSON.stringify(kept), { mode: 0o600 });
      renameSync(`${path}.part`, path);
      done();
    }, done);
  },
});

server.on('error', (error) => {
  console.error(error.message);
  process.exit(1);
});
server.listen(Number(port), '127.0.0.1');
process.once('SIGTERM', () => server.close(() => process.exit(0)));
