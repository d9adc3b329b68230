import { Controller, Get, Param } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import { recipeSchema, recipeSummarySchema, type Recipe, type RecipeSummary } from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { RecipesService } from './recipes.service.js';

@ApiTags('recipes')
@ApiBearerAuth()
@Controller('recipes')
export class RecipesController {
  constructor(private readonly recipes: RecipesService) {}

  @Get()
  @Requires('recipes:read')
  @AnswersList(recipeSummarySchema)
  list(@Actor() actor: Actor): Promise<RecipeSummary[]> {
    return this.recipes.list(actor.houseId);
  }

  @Get(':id')
  @Requires('recipes:read')
  @Answers(recipeSchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Recipe> {
    return this.recipes.get(actor.houseId, id);
  }
}
