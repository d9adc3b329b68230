import { Body, Controller, Get, Post, StreamableFile } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  importedStoresSchema,
  importPreviewSchema,
  importStoresSchema,
  type ImportedStores,
  type ImportPreview,
  type ImportStores,
} from '@steepfall/shared/contracts';
import { Requires } from '../../common/access/access.decorators.js';
import { Actor } from '../../common/access/actor.js';
import { Answers, AnswersFile } from '../../common/http/answers.decorator.js';
import { StoresCsvService } from './stores-csv.service.js';

@ApiTags('stores')
@ApiBearerAuth()
@Controller('stores')
export class StoresCsvController {
  constructor(private readonly csv: StoresCsvService) {}

  /** What a file would do, row by row. Nothing is stored. */
  @Post('import/preview')
  @Requires('stores:manage')
  @Answers(importPreviewSchema)
  preview(@Actor() actor: Actor, @Body({ schema: importStoresSchema }) body: ImportStores): Promise<ImportPreview> {
    return this.csv.preview(actor.houseId, body);
  }

  @Post('import')
  @Requires('stores:manage')
  @Answers(importedStoresSchema)
  import(@Actor() actor: Actor, @Body({ schema: importStoresSchema }) body: ImportStores): Promise<ImportedStores> {
    return this.csv.import(actor, body);
  }

  @Get('export')
  @Requires('stores:read')
  @AnswersFile('text/csv')
  async export(@Actor() actor: Actor): Promise<StreamableFile> {
    const csv = await this.csv.export(actor.houseId);
    return new StreamableFile(Buffer.from(csv, 'utf8'), {
      type: 'text/csv; charset=utf-8; header=present',
      disposition: 'attachment; filename="stores.csv"',
    });
  }
}
