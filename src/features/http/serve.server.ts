import { createServer, type RequestListener, type ServerResponse } from 'node:http';

export interface Serving {
  /**
   * Takes no new requests, ends event streams at once, lets the rest finish.
   * Resolves when the last connection is gone, after `patience` (usual: eight seconds) at the latest.
   */
  stop(options?: { patience?: number }): Promise<void>;
}

const SECOND = 1000;

/** Listens, with the front door before the handler; rejects with the socket's own error (`EADDRINUSE`…) when it cannot. */
export async function serve(
  listener: RequestListener,
  { port, host }: { port: number; host: string },
): Promise<Serving> {
  const open = new Set<ServerResponse>();
  const server = createServer((req, res) => {
    res.on('close', () => open.delete(res));
    open.add(res);
    listener(req, res);
  });
  // A slow phone may take its time over a picture, but not over its headers.
  server.requestTimeout = 120 * SECOND;
  server.headersTimeout = 15 * SECOND;
  server.keepAliveTimeout = 10 * SECOND;
  server.on('clientError', (_error, socket) => {
    if (socket.writable) socket.end('HTTP/1.1 400 Bad Request\r\nconnection: close\r\ncontent-length: 0\r\n\r\n');
  });

  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => resolve());
  });

  return {
    async stop({ patience = 8 * SECOND } = {}) {
      const closed = new Promise<void>((resolve) => server.close(() => resolve()));
      for (const res of open) {
        if (String(res.getHeader('content-type')).startsWith('text/event-stream')) res.end();
      }
      // Connections fall idle one by one as their answers end.
      const idle = setInterval(() => server.closeIdleConnections(), 50);
      const last = setTimeout(() => server.closeAllConnections(), patience);
      await closed;
      clearInterval(idle);
      clearTimeout(last);
    },
  };
}
