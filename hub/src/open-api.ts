import type { INestApplication } from '@nestjs/common';
import { DocumentBuilder, SwaggerModule } from '@nestjs/swagger';
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
  SwaggerModule.setup('api/docs', app, () => SwaggerModule.createDocument(app, base), {
    jsonDocumentUrl: 'api/docs-json',
    customSiteTitle: 'Steepfall hub API',
  });
}
