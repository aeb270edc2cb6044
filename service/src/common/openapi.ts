import type { INestApplication } from '@nestjs/common';
import { DocumentBuilder, type OpenAPIObject, SwaggerModule } from '@nestjs/swagger';
import { z } from 'zod';
import { ERROR_CATALOGUE, errorType } from '@eremite/shared/contracts/errors';
import { problem } from '@eremite/shared/contracts/problem';

const ABOUT = `Every path, its request and its answer, made from the schemas that validate them.

Sign in with POST /auth/sign-in (cookies; echo the cookie \`csrf\` in the header \`X-CSRF-Token\` on unsafe methods) or send
\`Authorization: Bearer <personal token>\`. Lists take \`limit\`, \`cursor\` and \`sort\`. A POST accepts \`Idempotency-Key\`.
Errors are \`application/problem+json\` with one of these types:

${Object.entries(ERROR_CATALOGUE)
  .map(([code, { status, title }]) => `- \`${errorType(code as keyof typeof ERROR_CATALOGUE)}\` (${status}): ${title}`)
  .join('\n')}`;

/** A zod schema as JSON schema; keys keep their unit and source, which the criteria state for each default. */
function toJsonSchema(schema: unknown, schemaType: 'input' | 'output') {
  if (!(schema instanceof z.ZodType)) return undefined;
  const json = z.toJSONSchema(schema, { io: schemaType, unrepresentable: 'any', target: 'draft-2020-12' });
  const { $schema: _, $defs, ...rest } = json;
  return { schema: rest, components: $defs ?? {} };
}

/** The OpenAPI 3.1 document of the whole interface. */
export function openApiDocument(app: INestApplication): OpenAPIObject {
  const about = new DocumentBuilder()
    .setTitle('Eremite')
    .setDescription(ABOUT)
    .setVersion('1')
    .setOpenAPIVersion('3.1.0')
    .addCookieAuth('access')
    .addBearerAuth()
    .addSecurityRequirements('cookie')
    .addSecurityRequirements('bearer')
    .addGlobalResponse({
      status: 'default',
      description: 'What went wrong (RFC 9457)',
      content: { 'application/problem+json': { schema: z.toJSONSchema(problem) as never } },
    })
    .build();
  return SwaggerModule.createDocument(app, about, {
    standardSchemaConverter: (schema: unknown, { schemaType }: { schemaType: 'input' | 'output' }) =>
      toJsonSchema(schema, schemaType) as never,
  });
}

/** Serves the document at /api/openapi.json and a page to browse it, with its scripts from here, at /api/docs. */
export function serveOpenApi(app: INestApplication): void {
  SwaggerModule.setup('api/docs', app, () => openApiDocument(app), {
    jsonDocumentUrl: 'api/openapi.json',
    raw: ['json'],
    customSiteTitle: 'Eremite: the interface',
    swaggerOptions: { docExpansion: 'none', validatorUrl: null },
  });
}
