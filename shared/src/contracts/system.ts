import { z } from 'zod';
import { contract } from './contract.ts';
import { nothing } from './wire.ts';

export const seeHealth = contract({
  method: 'get',
  path: '/api/health',
  summary: 'Whether the application and its database answer',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.strictObject({ isWell: z.literal(true) }),
});

export const seeOpenApi = contract({
  method: 'get',
  path: '/api/openapi.json',
  summary: 'This description',
  params: nothing,
  query: nothing,
  body: nothing,
  reply: z.looseObject({ openapi: z.string() }),
});
