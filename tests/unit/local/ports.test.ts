import net from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { freePort, isFree } from '@/lib/local/ports';
import { choosePorts, PREFERRED_PORTS } from '@/lib/local/settings';

const servers: net.Server[] = [];

/** Really listens, so the look at the port is checked against the operating system. */
async function occupy(host: string): Promise<number> {
  const server = net.createServer();
  servers.push(server);
  await new Promise<void>((resolve) => server.listen(0, host, () => resolve()));
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  return address.port;
}

afterEach(async () => {
  await Promise.all(servers.splice(0).map((server) => new Promise((resolve) => server.close(resolve))));
});

describe('ports', () => {
  it.each(['127.0.0.1', '0.0.0.0'])('a port that somebody listens on at %s is not free', async (host) => {
    expect(await isFree(await occupy(host))).toBe(false);
  });

  it('a taken port gives way to a later one that can be listened on', async () => {
    const taken = await occupy('127.0.0.1');
    const port = await freePort(taken);
    expect(port).toBeGreaterThan(taken);
    expect(await isFree(port)).toBe(true);
  });

  it('keeps every remembered port that is still free', async () => {
    expect(await choosePorts(PREFERRED_PORTS, async (preferred) => preferred)).toEqual(PREFERRED_PORTS);
  });

  it('gives no port twice when several must move', async () => {
    const crowded = { web: 4300, clerk: 4300, stripe: 4300, mailbox: 4300, smtp: 4300 };
    const pick = async (preferred: number, taken: ReadonlySet<number>) => {
      let port = preferred;
      while (taken.has(port)) port += 1;
      return port;
    };
    expect(new Set(Object.values(await choosePorts(crowded, pick))).size).toBe(5);
  });
});
