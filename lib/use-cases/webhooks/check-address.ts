import { lookup } from "node:dns/promises";
import { BlockList, isIP, isIPv6 } from "node:net";
import { AppError } from "@/lib/shared/app-error";

/**
 * Networks that are not the public internet: this host, private, shared and link-local ones, multicast, documentation and reserved.
 * From IANA's special-purpose address registries (RFC 6890 and its successors).
 */
const specialNetworks = {
  ipv4: [
    ["0.0.0.0", 8], ["10.0.0.0", 8], ["100.64.0.0", 10], ["127.0.0.0", 8], ["169.254.0.0", 16], ["172.16.0.0", 12], ["192.0.0.0", 24], ["192.0.2.0", 24],
    ["192.88.99.0", 24], ["192.168.0.0", 16], ["198.18.0.0", 15], ["198.51.100.0", 24], ["203.0.113.0", 24], ["224.0.0.0", 4], ["240.0.0.0", 4],
  ],
  ipv6: [
    ["::", 96], ["::ffff:0:0", 96], ["64:ff9b::", 96], ["64:ff9b:1::", 48], ["100::", 64], ["2001::", 23], ["2001:db8::", 32], ["2002::", 16], ["3fff::", 20],
    ["5f00::", 16], ["fc00::", 7], ["fe80::", 10], ["fec0::", 10], ["ff00::", 8],
  ],
} as const;

// A list each: in one, the IPv6 network of mapped IPv4 addresses would match every IPv4 address.
const special = { ipv4: new BlockList(), ipv6: new BlockList() };
for (const [network, prefix] of specialNetworks.ipv4) special.ipv4.addSubnet(network, prefix, "ipv4");
for (const [network, prefix] of specialNetworks.ipv6) special.ipv6.addSubnet(network, prefix, "ipv6");

/** Whether an IP address is one of the public internet. Addresses that embed an IPv4 one are judged special as a whole. */
export function isPublicAddress(address: string): boolean {
  if (isIP(address) === 0) return false;
  const kind = isIPv6(address) ? "ipv6" : "ipv4";
  return !special[kind].check(address, kind);
}

export type Destination = { url: URL; address: string; family: 4 | 6 };

/** Whether webhooks may go to private addresses: an installation's own choice, for receivers inside its network. */
function privateAllowed(): boolean {
  return process.env.SADDLEMARK_ALLOW_PRIVATE_WEBHOOKS === "1";
}

/**
 * Where a webhook's address leads just now: every address of its name must be public, and the one to connect to is named, so that a name
 * that changes between the check and the connection gains nothing. Throws AppError "invalid" with the reason.
 */
export async function resolveDestination(text: string): Promise<Destination> {
  const url = parseAddress(text);
  const host = url.hostname.replace(/^\[|\]$/g, "");
  const found = await lookup(host, { all: true, verbatim: true }).catch((cause: unknown) => {
    throw refused(`The name ${host} can't be found.`, cause);
  });
  const [first] = found;
  if (first === undefined) throw refused(`The name ${host} has no address.`);
  if (!privateAllowed() && !found.every(({ address }) => isPublicAddress(address))) {
    throw refused(`${host} is not on the public internet. An installation allows such addresses with SADDLEMARK_ALLOW_PRIVATE_WEBHOOKS=1.`);
  }
  return { url, address: first.address, family: first.family === 6 ? 6 : 4 };
}

function parseAddress(text: string): URL {
  const url = URL.canParse(text) ? new URL(text) : null;
  if (url === null || (url.protocol !== "https:" && url.protocol !== "http:")) throw refused("Give an address that begins with https:// or http://.");
  if (url.username !== "" || url.password !== "") throw refused("Leave user name and password out of the address; the signature shows who sends.");
  return url;
}

function refused(message: string, cause?: unknown): AppError {
  // A name that is not found is no failure of ours: nothing to log.
  return new AppError("invalid", message, { fields: [{ path: "url", message }], ...(cause instanceof Error ? { detail: cause.message } : {}) });
}
