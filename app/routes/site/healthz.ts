import { json } from '#app/features/api/api.server.ts';
import { checkHealth } from '#app/features/site/health.server.ts';

export async function loader() {
  const health = await checkHealth();
  return json(health, health.database && health.storage ? 200 : 503);
}
