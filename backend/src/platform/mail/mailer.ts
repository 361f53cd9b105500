import nodemailer from 'nodemailer';

/** A letter as the mail server gets it. */
export interface OutgoingMail {
  readonly messageId: string;
  readonly to: { readonly name: string; readonly address: string };
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface Mailer {
  /** Hands one letter over and returns the server's answer. Throws when the server refuses. */
  send(mail: OutgoingMail): Promise<string>;
  close(): void;
}

const connectionTimeoutMs = 10_000;

/** The mail server at an `smtp://` or `smtps://` address. */
export function smtpMailer(settings: {
  readonly smtpUrl: string;
  readonly from: { readonly name: string; readonly address: string };
  readonly replyTo: string;
}): Mailer {
  const url = new URL(settings.smtpUrl);
  const transport = nodemailer.createTransport({
    host: url.hostname,
    port: Number(url.port) || (url.protocol === 'smtps:' ? 465 : 587),
    secure: url.protocol === 'smtps:',
    ...(url.username === ''
      ? {}
      : {
          auth: {
            user: decodeURIComponent(url.username),
            pass: decodeURIComponent(url.password),
          },
        }),
    pool: true,
    maxConnections: 2,
    connectionTimeout: connectionTimeoutMs,
    greetingTimeout: connectionTimeoutMs,
    socketTimeout: connectionTimeoutMs,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    async send(mail) {
      const sent = await transport.sendMail({
        from: settings.from,
        replyTo: settings.replyTo,
        to: mail.to,
        subject: mail.subject,
        text: mail.text,
        html: mail.html,
        messageId: mail.messageId,
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
      return sent.response;
    },
    close: () => transport.close(),
  };
}
