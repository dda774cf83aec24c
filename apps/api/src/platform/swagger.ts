import type { INestApplication } from '@nestjs/common';
import { DocumentBuilder, SwaggerModule } from '@nestjs/swagger';

/** Describes the routes at /api/docs and /api/openapi.json. */
export function describeRoutes(app: INestApplication): void {
  const description = new DocumentBuilder()
    .setTitle('Ebbline')
    .setDescription('Lots, their verdicts, holds and decisions. Every failed request answers application/problem+json.')
    .setVersion('1')
    .addBearerAuth()
    .build();
  SwaggerModule.setup('api/docs', app, () => SwaggerModule.createDocument(app, description), {
    jsonDocumentUrl: 'api/openapi.json',
    customSiteTitle: 'Ebbline routes',
  });
}
