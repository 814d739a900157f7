import { startStack } from '#fakes/stack.ts';

/** MariaDB and the fakes for the tests, over a folder of their own, on ports that are free. */
export async function startTestServices(folder: string) {
  const stack = await startStack({ folder, mode: 'test' });
  return {
    environment: {
      ...stack.environment,
      PORT: String(stack.port),
      BCRYPT_COST: '4',
      LOG_LEVEL: process.env.LOG_LEVEL ?? 'error',
      IMAGE_WORKERS: '2',
      TEST_DATABASE_URL: stack.environment.DATABASE_URL,
    },
    stop: () => stack.stop(),
  };
}
