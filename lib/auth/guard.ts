import type { z } from "zod";
import { AppError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { isReadPermission, mayRole, type Permission, type Role } from "./permissions";

/** Who asks: made by `actorFromHeaders` from a session cookie or an API key. */
export type Actor = {
  userId: string;
  userName: string;
  userEmail: string;
  teamId: string;
  teamName: string;
  role: Role;
  via: { kind: "session" } | { kind: "key"; keyId: string; scope: "read" | "write" };
};

declare const scopeBrand: unique symbol;
/** Proof that the guard let an actor through; queries require one. Only `defineUseCase` makes it. */
export type Scope = { readonly teamId: string; readonly userId: string; readonly role: Role } & { readonly [scopeBrand]: true };

function grantScope(actor: Actor): Scope {
  const scope: Omit<Scope, typeof scopeBrand> = { teamId: actor.teamId, userId: actor.userId, role: actor.role };
  return scope as Scope;
}

export function authorise(actor: Actor | null, permission: Permission): Scope {
  if (!actor) throw new AppError("unauthenticated", "Sign in, or send an API key as a bearer token.");
  if (!mayRole(actor.role, permission)) throw new AppError("forbidden", `Your role in this team, ${actor.role}, does not allow this.`);
  if (actor.via.kind === "key" && actor.via.scope === "read" && !isReadPermission(permission)) {
    throw new AppError("forbidden", "This key may only read.");
  }
  return grantScope(actor);
}

type UseCaseDefinition<Input extends z.ZodType, Output> = {
  permission: Permission;
  input: Input;
  run: (context: { scope: Scope; actor: Actor }, input: z.output<Input>) => Promise<Output>;
};

export type UseCase<Input extends z.ZodType, Output> = {
  (actor: Actor | null, input: unknown): Promise<Output>;
  permission: Permission;
  input: Input;
};

/**
 * The only way to make a use-case: authorises first, then parses, then runs. `permission` has no default.
 * Throws AppError "unauthenticated", "forbidden" or "invalid" (with field paths).
 */
export function defineUseCase<Input extends z.ZodType, Output>(definition: UseCaseDefinition<Input, Output>): UseCase<Input, Output> {
  const execute = async (actor: Actor | null, input: unknown): Promise<Output> => {
    const scope = authorise(actor, definition.permission);
    const parsed = definition.input.safeParse(input);
    if (!parsed.success) throw new AppError("invalid", "Some answers can't be used.", { fields: fieldErrorsOf(parsed.error) });
    if (!actor) throw new AppError("unauthenticated", "Sign in first.");
    return definition.run({ scope, actor }, parsed.data);
  };
  return Object.assign(execute, { permission: definition.permission, input: definition.input });
}

/** Somebody signed in, with or without a team. */
export type SignedIn = { userId: string; userName: string; userEmail: string; sessionToken: string };

type OpenUseCase<Context, Input extends z.ZodType, Output> = {
  (context: Context, input: unknown): Promise<Output>;
  permission: "public" | "signed-in";
  input: Input;
};

/** A use-case for anybody; says "public" out loud. Throws AppError "invalid". */
export function definePublicUseCase<Input extends z.ZodType, Output>(definition: {
  permission: "public";
  input: Input;
  run: (request: { headers: Headers }, input: z.output<Input>) => Promise<Output>;
}): OpenUseCase<{ headers: Headers }, Input, Output> {
  const execute = async (request: { headers: Headers }, input: unknown) => definition.run(request, parseInput(definition.input, input));
  return Object.assign(execute, { permission: definition.permission, input: definition.input });
}

/** A use-case for any account, in whatever team or none. Throws AppError "unauthenticated" or "invalid". */
export function definePersonUseCase<Input extends z.ZodType, Output>(definition: {
  permission: "signed-in";
  input: Input;
  run: (person: SignedIn, input: z.output<Input>) => Promise<Output>;
}): OpenUseCase<SignedIn | null, Input, Output> {
  const execute = async (person: SignedIn | null, input: unknown) => {
    if (!person) throw new AppError("unauthenticated", "Sign in first.");
    return definition.run(person, parseInput(definition.input, input));
  };
  return Object.assign(execute, { permission: definition.permission, input: definition.input });
}

function parseInput<Input extends z.ZodType>(schema: Input, input: unknown): z.output<Input> {
  const parsed = schema.safeParse(input);
  if (!parsed.success) throw new AppError("invalid", "Some answers can't be used.", { fields: fieldErrorsOf(parsed.error) });
  return parsed.data;
}
