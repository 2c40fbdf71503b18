import { randomBytes } from "node:crypto";

/** 192 random bits in 32 letters fit for addresses: also the secret of an invitation's link. */
export function newId(): string {
  return randomBytes(24).toString("base64url");
}
