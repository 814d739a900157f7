import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { z } from 'zod';
import { env } from '#app/server/env.server.ts';

const storedMail = z.object({
  id: z.string(),
  from: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  receivedAt: z.string(),
});
export type StoredMail = z.infer<typeof storedMail>;

/** The newest mails that the mail fake took in; null where real mail is sent. */
export async function listMailbox(limit = 50): Promise<StoredMail[] | null> {
  if (!env.MAILBOX_DIR) return null;
  const files = (await readdir(env.MAILBOX_DIR)).filter((name) => name.endsWith('.json'));
  const texts = await Promise.all(
    files.map((name) => readFile(path.join(env.MAILBOX_DIR as string, name), 'utf8')),
  );
  return texts
    .map((text) => storedMail.parse(JSON.parse(text)))
    .sort((a, b) => b.receivedAt.localeCompare(a.receivedAt))
    .slice(0, limit);
}
