import { MailDev } from 'maildev';
import { endWithLauncher } from './end-with-launcher.ts';

const catcher = new MailDev({
  smtp: Number(process.env['MAIL_CATCHER_SMTP_PORT']),
  web: Number(process.env['MAIL_CATCHER_WEB_PORT']),
  // Left alone it would listen to the whole network.
  ip: '127.0.0.1',
  webIp: '127.0.0.1',
  mailDirectory: process.env['MAIL_CATCHER_FOLDER'] ?? '',
  silent: true,
});
await catcher.start();
endWithLauncher(() => catcher.stop());
