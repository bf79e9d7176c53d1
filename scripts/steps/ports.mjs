import net from 'node:net';
import { Refusal } from './say.mjs';

function listen(port) {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => {
      const taken = server.address().port;
      server.close(() => resolve(taken));
    });
  });
}

export const freePort = () => listen(0);

/** `ports` maps the variable that chooses a port to the port. */
export async function requireFreePorts(ports) {
  for (const [variable, port] of Object.entries(ports)) {
    try {
      await listen(port);
    } catch (error) {
      const reason = error.code === 'EADDRINUSE' ? 'is taken by another program' : `may not be used (${error.code})`;
      throw new Refusal(`Port ${port} ${reason}: free it, or choose another one with ${variable}=<port>.`);
    }
  }
}
