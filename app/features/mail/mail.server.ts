import { createTransport, type Transporter } from 'nodemailer';
import { env } from '#app/server/env.server.ts';

type Mail = { to: string; subject: string; text: string };

let transport: Transporter | undefined;

/** Hands a plain-text mail to the SMTP server of the environment. Throws when the server refuses it. */
export async function sendMail(mail: Mail): Promise<void> {
  transport ??= createTransport(env.SMTP_URL, { from: env.MAIL_FROM });
  await transport.sendMail(mail);
}
