import net from 'node:net';

/** Whether 127.0.0.1:port can be listened on now. */
export function portIsFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** A port the system has to spare. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen({ port: 0, host: '127.0.0.1' }, () => {
      const { port } = server.address() as net.AddressInfo;
      server.close(() => resolve(port));
    });
  });
}

/** `preferred` while it is free, else another. */
export async function portNear(preferred: number | undefined): Promise<number> {
  return preferred && (await portIsFree(preferred)) ? preferred : freePort();
}
