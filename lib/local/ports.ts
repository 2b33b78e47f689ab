import net from 'node:net';

function canListen(port: number, host: string): Promise<boolean> {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', (error: NodeJS.ErrnoException) =>
      // No IPv6 on this machine is no reason against a port.
      resolve(error.code === 'EADDRNOTAVAIL' || error.code === 'EAFNOSUPPORT'),
    );
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** Whether nobody listens on this port of the loopback addresses. */
export async function isFree(port: number): Promise<boolean> {
  return (await canListen(port, '127.0.0.1')) && (await canListen(port, '::1'));
}

/** The first free port from `preferred` on that is not in `taken`; looks at 200 at most. */
export async function freePort(preferred: number, taken: ReadonlySet<number> = new Set()): Promise<number> {
  for (let port = preferred; port < preferred + 200; port += 1) {
    if (!taken.has(port) && (await isFree(port))) return port;
  }
  throw new Error(`No free port between ${preferred} and ${preferred + 199}.`);
}
