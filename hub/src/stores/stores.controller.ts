import { Body, Controller, Delete, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  createIngredientSchema,
  ingredientSchema,
  lotMoveSchema,
  moveLotSchema,
  receiveLotSchema,
  updateIngredientSchema,
  updateLotSchema,
  type CreateIngredient,
  type Ingredient,
  type LotMove,
  type MoveLot,
  type ReceiveLot,
  type UpdateIngredient,
  type UpdateLot,
} from '@steepfall/shared/contracts';
import { z } from 'zod';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList, AnswersNothing } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { LedgerService } from './ledger.service.js';
import { ShelfService } from './shelf.service.js';

const listQuerySchema = z.strictObject({ removed: z.stringbool().default(false) });

@ApiTags('stores')
@ApiBearerAuth()
@Controller('stores')
export class StoresController {
  constructor(
    private readonly shelf: ShelfService,
    private readonly ledger: LedgerService,
  ) {}

  @Get()
  @Requires('stores:read')
  @AnswersList(ingredientSchema)
  list(
    @Actor() actor: Actor,
    @Query({ schema: listQuerySchema }) query: z.infer<typeof listQuerySchema>,
  ): Promise<Ingredient[]> {
    return this.shelf.list(actor.houseId, query);
  }

  @Post('ingredients')
  @Requires('stores:manage')
  @Answers(ingredientSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createIngredientSchema }) body: CreateIngredient): Promise<Ingredient> {
    return this.shelf.create(actor, body);
  }

  @Patch('ingredients/:id')
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  update(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateIngredientSchema }) body: UpdateIngredient,
  ): Promise<Ingredient> {
    return this.shelf.update(actor, id, body);
  }

  @Delete('ingredients/:id')
  @Requires('stores:manage')
  @AnswersNothing()
  remove(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<void> {
    return this.shelf.remove(actor, id);
  }

  @Post('ingredients/:id/restore')
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  restore(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Ingredient> {
    return this.shelf.restore(actor, id);
  }

  @Post('ingredients/:id/lots')
  @Requires('stores:manage')
  @Answers(ingredientSchema, { status: 201 })
  receive(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: receiveLotSchema }) body: ReceiveLot,
  ): Promise<Ingredient> {
    return this.shelf.receive(actor, id, body);
  }

  @Patch('lots/:id')
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  updateLot(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateLotSchema }) body: UpdateLot,
  ): Promise<Ingredient> {
    return this.shelf.updateLot(actor, id, body);
  }

  @Delete('lots/:id')
  @Requires('stores:manage')
  @AnswersNothing()
  removeLot(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<void> {
    return this.shelf.removeLot(actor, id);
  }

  @Post('lots/:id/restore')
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  restoreLot(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Ingredient> {
    return this.shelf.restoreLot(actor, id);
  }

  @Get('lots/:id/moves')
  @Requires('stores:read')
  @AnswersList(lotMoveSchema)
  moves(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<LotMove[]> {
    return this.ledger.list(actor.houseId, id);
  }

  @Post('lots/:id/moves')
  @Requires('stores:manage')
  @Answers(ingredientSchema, { status: 201 })
  move(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: moveLotSchema }) body: MoveLot,
  ): Promise<Ingredient> {
    return this.ledger.move(actor, id, body);
  }

  /** Takes a line back, by a counter-line. */
  @Delete('moves/:id')
  @Requires('stores:manage')
  @Answers(ingredientSchema)
  undo(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Ingredient> {
    return this.ledger.undo(actor, id);
  }
}
