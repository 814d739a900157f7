import { json } from '#app/features/api/api.server.ts';
import { openApiDocument } from '#app/features/api/openapi.server.ts';

/** The description of the API; open to anyone, since it holds no data. */
export const loader = () => json(openApiDocument());
