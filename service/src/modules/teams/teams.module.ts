import { Module } from '@nestjs/common';
import { InvitationsController } from './invitations.controller.ts';
import { InvitationsService } from './invitations.service.ts';
import { OutboxController } from './outbox.controller.ts';
import { OutboxService } from './outbox.service.ts';
import { TeamsController } from './teams.controller.ts';
import { TeamsRepository } from './teams.repository.ts';
import { TeamsService } from './teams.service.ts';

@Module({
  controllers: [TeamsController, InvitationsController, OutboxController],
  providers: [TeamsRepository, TeamsService, InvitationsService, OutboxService],
  exports: [TeamsRepository, TeamsService],
})
export class TeamsModule {}
