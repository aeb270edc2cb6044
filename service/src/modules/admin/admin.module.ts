import { Module } from '@nestjs/common';
import { AdminController } from './admin.controller.ts';
import { AdminRepository } from './admin.repository.ts';
import { AdminService } from './admin.service.ts';

@Module({ controllers: [AdminController], providers: [AdminRepository, AdminService] })
export class AdminModule {}
