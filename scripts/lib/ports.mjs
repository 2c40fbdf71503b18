import { createServer } from "node:net";
import { PlainError } from "./plain-error.mjs";

const host = "127.0.0.1";

/**
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export async function isPortFree(port) {
  try {
    await listenOnce(port);
    return true;
  } catch (error) {
    const code = error instanceof Error && "code" in error ? error.code : "";
    if (code === "EADDRINUSE") return false;
    if (code === "EACCES") throw new PlainError(`Port ${port} needs an administrator's rights; choose one above 1023 with --port.`);
    throw error;
  }
}

/** @returns {Promise<number>} a port of 127.0.0.1 that nothing listens on */
export async function findFreePort() {
  return listenOnce(0);
}

/** @param {number} port */
export async function requireFreePort(port) {
  if (await isPortFree(port)) return;
  throw new PlainError(`Port ${port} on ${host} is taken; stop what listens there or choose another with --port.`);
}

/**
 * @param {number} port
 * @returns {Promise<number>}
 */
function listenOnce(port) {
  return new Promise((settle, fail) => {
    const server = createServer();
    server.once("error", fail);
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address();
      const chosen = typeof address === "object" && address !== null ? address.port : port;
      server.close(() => settle(chosen));
    });
  });
}
