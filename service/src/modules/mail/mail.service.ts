import { Inject, Injectable, Logger, type OnModuleDestroy } from '@nestjs/common';
import { createTransport, type Transporter } from 'nodemailer';
import { ENV, type Env } from '../../config/env.ts';
import { type MailRow, MailRepository } from './mail.repository.ts';

/** Mail goes out over SMTP where a server is configured; else it stays in the outbox, to be handed on by hand. */
@Injectable()
export class MailService implements OnModuleDestroy {
  readonly #log = new Logger(MailService.name);
  readonly #transport: Transporter | undefined;
  #sending: Promise<unknown> = Promise.resolve();

  constructor(
    private readonly mails: MailRepository,
    @Inject(ENV) private readonly env: Env,
  ) {
    this.#transport = env.smtpUrl ? createTransport(env.smtpUrl) : undefined;
  }

  /** Keeps the mail and sends it in the background; an unreachable server does not hold up the caller. */
  async send(mail: { teamId?: string; to: string; subject: string; text: string }): Promise<void> {
    const row = await this.mails.insert({ ...mail, state: this.#transport ? 'queued' : 'kept' });
    if (this.#transport) this.#sending = this.#sending.then(() => this.#deliver(row, this.#transport!));
  }

  async onModuleDestroy(): Promise<void> {
    await this.#sending;
    this.#transport?.close();
  }

  async #deliver({ id, to, subject, text }: MailRow, transport: Transporter): Promise<void> {
    try {
      await transport.sendMail({ from: this.env.mailFrom, to, subject, text });
      await this.mails.markSent(id);
    } catch (error) {
      const reason = error instanceof Error ? error.message : String(error);
      this.#log.warn({ mailId: id }, 'a mail could not be sent');
      await this.mails.markFailed(id, reason.slice(0, 500));
    }
  }
}
