import { Body, Controller, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  createRecipeSchema,
  createRevisionSchema,
  recipeSchema,
  recipeSummarySchema,
  updateRecipeSchema,
  type CreateRecipe,
  type CreateRevision,
  type Recipe,
  type RecipeSummary,
  type UpdateRecipe,
} from '@steepfall/shared/contracts';
import { z } from 'zod';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { RecipesService } from './recipes.service.js';

const listQuerySchema = z.strictObject({ archived: z.stringbool().default(false) });

@ApiTags('recipes')
@ApiBearerAuth()
@Controller('recipes')
export class RecipesController {
  constructor(private readonly recipes: RecipesService) {}

  @Get()
  @Requires('recipes:read')
  @AnswersList(recipeSummarySchema)
  list(
    @Actor() actor: Actor,
    @Query({ schema: listQuerySchema }) query: z.infer<typeof listQuerySchema>,
  ): Promise<RecipeSummary[]> {
    return this.recipes.list(actor.houseId, query);
  }

  /** A copy is a recipe that starts with the document of another. */
  @Post()
  @Requires('recipes:manage')
  @Answers(recipeSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createRecipeSchema }) body: CreateRecipe): Promise<Recipe> {
    return this.recipes.create(actor, body);
  }

  @Get(':id')
  @Requires('recipes:read')
  @Answers(recipeSchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Recipe> {
    return this.recipes.get(actor.houseId, id);
  }

  @Patch(':id')
  @Requires('recipes:manage')
  @Answers(recipeSummarySchema)
  update(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateRecipeSchema }) body: UpdateRecipe,
  ): Promise<RecipeSummary> {
    return this.recipes.update(actor, id, body);
  }

  @Post(':id/revisions')
  @Requires('recipes:manage')
  @Answers(recipeSchema, { status: 201 })
  revise(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: createRevisionSchema }) body: CreateRevision,
  ): Promise<Recipe> {
    return this.recipes.revise(actor, id, body);
  }
}
