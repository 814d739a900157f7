import { sequelize } from '#db/connection.server.ts';

const LOOK_EVERY_MS = 50;

let underWay = 0;
let stopping = false;

/** Counts a request while it is worked on, so that a stop lets it finish. */
export async function whileUnderWay<T>(work: () => Promise<T>): Promise<T> {
  underWay += 1;
  try {
    return await work();
  } finally {
    underWay -= 1;
  }
}

/** Idle database connections would keep a stopped server alive; they are closed once the last request is done. */
function closeWhenIdle(): void {
  if (stopping) return;
  stopping = true;
  const timer = setInterval(() => {
    if (underWay > 0) return;
    clearInterval(timer);
    void sequelize.close();
  }, LOOK_EVERY_MS);
}

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, closeWhenIdle);
