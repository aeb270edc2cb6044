import { Global, Module } from '@nestjs/common';
import { MailRepository } from './mail.repository.ts';
import { MailService } from './mail.service.ts';

@Global()
@Module({ providers: [MailRepository, MailService], exports: [MailRepository, MailService] })
export class MailModule {}
