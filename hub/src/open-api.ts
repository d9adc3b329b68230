import type { INestApplication } from '@nestjs/common';
import { DocumentBuilder, SwaggerModule, type OpenAPIObject } from '@nestjs/swagger';
import { hubVersion } from './health/version.js';

/** The description of the API at `/api/docs`, as JSON at `/api/docs-json`. It is written from the schemas that check the requests. */
export function serveOpenApi(app: INestApplication): void {
  const base = new DocumentBuilder()
    .setTitle('Steepfall hub')
    .setDescription(
      'Everything in °C, g, L, kPa, seconds and epoch milliseconds; the unit is in the name of every field.',
    )
    .setVersion(hubVersion)
    .addBearerAuth()
    .build();
  SwaggerModule.setup('api/docs', app, () => withProblemType(SwaggerModule.createDocument(app, base)), {
    jsonDocumentUrl: 'api/docs-json',
    customSiteTitle: 'Steepfall hub API',
  });
}

/** Problems travel as `application/problem+json`; the generator knows one media type for all answers of a handler. */
function withProblemType(document: OpenAPIObject): OpenAPIObject {
  for (const path of Object.values(document.paths))
    for (const method of ['get', 'post', 'patch', 'put', 'delete'] as const) {
      const told = path[method]?.responses['default'];
      const schema = told && 'content' in told ? told.content?.['application/json'] : undefined;
      if (told && 'content' in told && schema) told.content = { 'application/problem+json': schema };
    }
  return document;
}
