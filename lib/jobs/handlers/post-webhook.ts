import { request as requestPlain, type RequestOptions } from "node:http";
import { request as requestSecure } from "node:https";
import type { Destination } from "@/lib/use-cases/webhooks/check-address";

const timeoutMilliseconds = 10_000;

type Message = { destination: Destination; headers: Record<string, string>; body: string };

/**
 * Posts a body to the address that was checked, whatever its name may resolve to by now, and returns the status. Follows no redirect and
 * reads no answer. Throws when nothing answered within ten seconds.
 */
export function postWebhook({ destination, headers, body }: Message): Promise<number> {
  const { url, address, family } = destination;
  const options: RequestOptions = {
    method: "POST",
    // A connection of its own: a pooled one might lead to an address that was checked earlier.
    agent: false,
    headers: { ...headers, "content-length": Buffer.byteLength(body) },
    signal: AbortSignal.timeout(timeoutMilliseconds),
    lookup: (_host, { all }, done) => {
      if (all === true) done(null, [{ address, family }]);
      else done(null, address, family);
    },
  };
  return new Promise((resolve, reject) => {
    const sent = (url.protocol === "https:" ? requestSecure : requestPlain)(url, options, (response) => {
      resolve(response.statusCode ?? 0);
      response.destroy();
    });
    sent.on("error", reject);
    sent.end(body);
  });
}
