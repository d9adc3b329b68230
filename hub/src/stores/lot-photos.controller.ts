import { Controller, Delete, Get, Header, Param, Post, StreamableFile } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import { ingredientSchema, type Ingredient } from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersFile } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { SentPicture, TakesPicture } from '../common/http/picture-upload.js';
import { LotPhotosService } from './lot-photos.service.js';

@ApiTags('stores')
@ApiBearerAuth()
@Controller('stores/lots/:id/photo')
export class LotPhotosController {
  constructor(private readonly photos: LotPhotosService) {}

  @Get()
  @Requires('stores:read')
  @AnswersFile('image/jpeg')
  @Header('Cache-Control', 'private, no-store')
  async get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<StreamableFile> {
    const { bytes, mediaType } = await this.photos.get(actor.houseId, id);
    const disposition = 'inline; filename="label.jpg"';
    return new StreamableFile(bytes, { type: mediaType, length: bytes.length, disposition });
  }

  @Post()
  @Requires('stores:manage')
  @TakesPicture('photo')
  @Answers(ingredientSchema)
  set(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @SentPicture('photo') sent: Buffer,
  ): Promise<Ingredient> {
    return this.photos.set(actor, id, sent);
  }

  @Delete()
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  remove(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Ingredient> {
    return this.photos.remove(actor, id);
  }
}
