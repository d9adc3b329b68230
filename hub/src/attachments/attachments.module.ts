import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AttachmentsService } from './attachments.service.js';
import { Attachment } from './models/attachment.model.js';

@Module({
  imports: [SequelizeModule.forFeature([Attachment])],
  providers: [AttachmentsService],
  exports: [AttachmentsService],
})
export class AttachmentsModule {}
