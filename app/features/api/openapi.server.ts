import { z } from 'zod';
import { createDocument } from 'zod-openapi';
import { CASE_STATES, LINK_KEYS } from '#app/domain/chain/chain.ts';
import { PHOTO_ROLES } from '#app/domain/photos/photo-role.ts';
import { env } from '#app/server/env.server.ts';
import { importLineSchema } from '../case-import/schema.ts';
import { holdTestBody, leakRateBody } from '../reference/answers.ts';
import { holdTestEntryBody, newEntryBody } from './entry-bodies.ts';
import { newCaseBody, newMachineBody } from './schema.ts';

const error = z
  .object({
    error: z.object({ code: z.string(), message: z.string(), fields: z.record(z.string(), z.string()) }),
  })
  .meta({ id: 'Error' });

const hit = z
  .object({
    number: z.int(),
    externalId: z.string().nullable(),
    title: z.string(),
    score: z.number().meta({ description: 'Higher is better; comparable within one answer only.' }),
    highlights: z
      .array(z.string())
      .meta({ description: 'Passages as HTML text with <mark> around what matched.' }),
    why: z.array(z.string()).meta({ description: 'In plain words, why this was found.' }),
    state: z.enum(CASE_STATES),
    cause: z.string(),
  })
  .meta({ id: 'Hit' });

const facetOption = z.object({ value: z.string(), label: z.string(), count: z.int() });
const found = z
  .object({
    results: z.array(hit),
    facets: z.record(z.string(), z.array(facetOption)),
    total: z.int(),
    repaired: z.array(z.object({ from: z.string(), to: z.string() })),
  })
  .meta({ id: 'Found' });

const wholeCase = z
  .looseObject({
    number: z.int(),
    externalId: z.string().nullable(),
    title: z.string(),
    state: z.enum(CASE_STATES),
    chain: z.array(
      z.object({
        key: z.enum(LINK_KEYS),
        state: z.enum(['missing', 'partly', 'done']),
        lacks: z.array(z.string()),
      }),
    ),
  })
  .meta({ id: 'Case' });

const photo = z
  .looseObject({
    id: z.int(),
    role: z.enum(PHOTO_ROLES),
    caption: z.string(),
    thumb: z.string(),
    medium: z.string(),
  })
  .meta({ id: 'Photo' });
const uploadErrors = z.array(z.object({ file: z.string(), error: z.string() }));
const machine = z.looseObject({ id: z.int(), number: z.string() }).meta({ id: 'Machine' });
const imported = z.object({
  created: z.int(),
  updated: z.int(),
  failed: z.array(z.object({ line: z.int(), errors: z.record(z.string(), z.string()) })),
});

const json = (schema: z.ZodType) => ({ content: { 'application/json': { schema } } });
const answer = (description: string, schema: z.ZodType) => ({ description, ...json(schema) });
const refusals = {
  '400': answer('Something in the request is wrong; `fields` says what.', error),
  '401': answer('No session and no token in force.', error),
  '403': answer('The role may not do this.', error),
  '404': answer('There is no such thing in this shop.', error),
};
const number = z.object({ number: z.int().meta({ description: 'The case number of the shop.' }) });
const limit = z.int().min(1).max(100).optional();

/** The API as an OpenAPI 3.1 document, made from the schemas that check it. */
export function openApiDocument() {
  return createDocument({
    openapi: '3.1.0',
    info: {
      title: 'Weepmark',
      version: '1',
      description:
        'The leak cases of one shop. Every answer is JSON; errors have one shape. Another shop’s rows are 404.',
    },
    servers: [{ url: env.PUBLIC_URL }],
    security: [{ token: [] }, { session: [] }],
    components: {
      securitySchemes: {
        token: { type: 'http', scheme: 'bearer' },
        session: { type: 'apiKey', in: 'cookie', name: 'weepmark_session' },
      },
    },
    paths: {
      '/api/v1/find': {
        get: {
          summary: 'Find cases in any words',
          requestParams: {
            query: z.object({
              q: z.string().optional(),
              limit,
              medium: z.string().optional(),
              page: z.int().optional(),
            }),
          },
          responses: { '200': answer('Best first, with counts to narrow down.', found), ...refusals },
        },
      },
      '/api/v1/cases': {
        get: {
          summary: 'List cases, newest first',
          requestParams: {
            query: z.object({
              state: z.string().optional(),
              medium: z.string().optional(),
              page: z.int().optional(),
            }),
          },
          responses: {
            '200': answer(
              'A page of cases.',
              z.looseObject({ cases: z.array(z.looseObject({})), total: z.int() }),
            ),
            ...refusals,
          },
        },
        post: {
          summary: 'Open a case',
          requestBody: json(newCaseBody),
          responses: { '201': answer('The case as it was opened.', wholeCase), ...refusals },
        },
      },
      '/api/v1/cases/import': {
        post: {
          summary:
            'Take in cases as JSON lines; the same id again updates, good lines are kept when others fail',
          requestBody: { content: { 'application/x-ndjson': { schema: importLineSchema } } },
          responses: { '200': answer('What became of the lines.', imported), ...refusals },
        },
      },
      '/api/v1/cases/{number}': {
        get: {
          summary: 'A case with everything recorded',
          requestParams: { path: number },
          responses: { '200': answer('The case.', wholeCase), ...refusals },
        },
      },
      '/api/v1/cases/{number}/alike': {
        get: {
          summary: 'The cases most like it, with the reasons',
          requestParams: { path: number, query: z.object({ limit }) },
          responses: { '200': answer('Most alike first.', z.object({ results: z.array(hit) })), ...refusals },
        },
      },
      '/api/v1/cases/{number}/photos': {
        get: {
          summary: 'The photos of a case',
          requestParams: { path: number },
          responses: { '200': answer('In their order.', z.object({ photos: z.array(photo) })), ...refusals },
        },
        post: {
          summary: 'Add photos: JPEG, PNG or WebP, 20 at a time, 25 MB each',
          requestParams: { path: number },
          requestBody: {
            content: {
              'multipart/form-data': {
                schema: z.object({
                  photos: z.array(z.string()),
                  role: z.enum(PHOTO_ROLES),
                  link: z.enum(LINK_KEYS),
                  caption: z.string(),
                }),
              },
            },
          },
          responses: {
            '201': answer(
              'What was kept and what was not.',
              z.object({ photos: z.array(photo), errors: uploadErrors }),
            ),
            ...refusals,
          },
        },
      },
      '/api/v1/cases/{number}/entries': {
        post: {
          summary: 'Add a reading, method, finding, repair, proof or charge entry; gates refuse with 409',
          requestParams: { path: number },
          requestBody: json(newEntryBody),
          responses: {
            '201': answer('The new entry.', z.object({ id: z.int(), entry: z.string() })),
            '409': answer('A gate stands against it.', error),
            ...refusals,
          },
        },
      },
      '/api/v1/cases/{number}/hold-tests': {
        post: {
          summary: 'Record a vacuum hold by its readings; its verdict becomes a proof',
          requestParams: { path: number },
          requestBody: json(holdTestEntryBody),
          responses: {
            '201': answer('The proof and where the case stands.', z.looseObject({})),
            '409': answer('A gate stands against it.', error),
            ...refusals,
          },
        },
      },
      ...referencePaths(),
      '/api/v1/machines': {
        get: {
          summary: 'List machines',
          requestParams: { query: z.object({ q: z.string().optional(), page: z.int().optional() }) },
          responses: {
            '200': answer(
              'A page of machines.',
              z.looseObject({ machines: z.array(machine), total: z.int() }),
            ),
            ...refusals,
          },
        },
        post: {
          summary: 'Add a machine',
          requestBody: json(newMachineBody),
          responses: { '201': answer('The machine.', machine), ...refusals },
        },
      },
      '/api/v1/machines/{id}': {
        get: {
          summary: 'A machine with its circuits and cases',
          requestParams: { path: z.object({ id: z.int() }) },
          responses: { '200': answer('The machine.', machine), ...refusals },
        },
      },
    },
  });
}

/** The calculators; the schemas are those that check the requests. */
function referencePaths() {
  const get = (summary: string, query: z.ZodObject) => ({
    get: {
      summary,
      requestParams: { query },
      responses: { '200': answer('Computed, with its source.', z.looseObject({})), ...refusals },
    },
  });
  const post = (summary: string, body: z.ZodType) => ({
    post: {
      summary,
      requestBody: json(body),
      responses: { '200': answer('Computed.', z.looseObject({})), ...refusals },
    },
  });
  const text = z.string();
  return {
    '/api/v1/reference/saturation': get(
      'Saturation of a refrigerant at a temperature or an absolute pressure',
      z.object({ refrigerant: text, temperatureC: z.number().optional(), pressurePa: z.number().optional() }),
    ),
    '/api/v1/reference/vacuum': get(
      'The deepest vacuum possible at an altitude',
      z.object({ altitudeM: z.number() }),
    ),
    '/api/v1/reference/charge-window': get(
      'Running pressures against the air outside',
      z.object({ refrigerant: text, ambientC: z.number() }),
    ),
    '/api/v1/reference/hold-test': post(
      'What a vacuum hold shows, and the smallest leak it could have seen',
      holdTestBody,
    ),
    '/api/v1/reference/leak-rate': post('Leak rate by the two methods of 40 CFR 82.152', leakRateBody),
  };
}
