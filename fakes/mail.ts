import { randomUUID } from 'node:crypto';
import { mkdir, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export type MailServer = { stop(): Promise<void> };

/** The mail fake on loopback: every mail becomes one JSON file of `folder`. */
export async function startMail({ folder, port }: { folder: string; port: number }): Promise<MailServer> {
  await mkdir(folder, { recursive: true });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, _session, callback) {
      simpleParser(stream)
        .then(async ({ from, to, subject, text }) => {
          const id = randomUUID();
          const addressed = [to ?? []].flat().map((address) => address.text);
          const mail = {
            id,
            from: from?.text ?? '',
            to: addressed.join(', '),
            subject: subject ?? '',
            text: text ?? '',
            receivedAt: new Date().toISOString(),
          };
          const file = path.join(folder, `${id}.json`);
          await writeFile(`${file}.part`, JSON.stringify(mail));
          await rename(`${file}.part`, file);
          callback();
        })
        .catch(callback);
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  return { stop: () => new Promise((resolve) => server.close(() => resolve())) };
}
