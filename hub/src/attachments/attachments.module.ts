import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { Attachment } from './models/attachment.model.js';

@Module({ imports: [SequelizeModule.forFeature([Attachment])] })
export class AttachmentsModule {}
