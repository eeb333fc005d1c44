/** A way to the run's own database that a test can cut, stall and mend, as a network would. */
import net from 'node:net';
import type { AddressInfo } from 'node:net';

export interface CuttableDatabase {
  readonly url: string;
  /** Ends every connection and refuses new ones. */
  cut(): void;
  /** Keeps connections and takes new ones, but nothing passes any more. */
  stall(): void;
  mend(): void;
  close(): Promise<void>;
}

export async function openCuttableDatabase(): Promise<CuttableDatabase> {
  const target = new URL(process.env.DATABASE_URL!);
  const open = new Set<net.Socket>();
  let state: 'whole' | 'cut' | 'stalled' = 'whole';

  const server = net.createServer((client) => {
    if (state === 'cut') return void client.destroy();
    const database = net.connect(Number(target.port), target.hostname);
    for (const [from, to] of [[client, database], [database, client]] as const) {
      open.add(from);
      from.on('data', (bytes) => {
        if (state !== 'stalled') to.write(bytes);
      });
      from.on('error', () => to.destroy());
      from.on('close', () => {
        open.delete(from);
        to.destroy();
      });
    }
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));

  const url = new URL(target);
  url.hostname = '127.0.0.1';
  url.port = String((server.address() as AddressInfo).port);
  const dropAll = () => open.forEach((socket) => socket.destroy());
  return {
    url: url.href,
    cut() {
      state = 'cut';
      dropAll();
    },
    stall() {
      state = 'stalled';
    },
    mend() {
      // What was half said on a stalled connection cannot be taken up again.
      if (state === 'stalled') dropAll();
      state = 'whole';
    },
    close: () => {
      dropAll();
      return new Promise((resolve) => server.close(() => resolve()));
    },
  };
}
