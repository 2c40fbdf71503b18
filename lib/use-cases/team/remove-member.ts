import { defineUseCase } from "@/lib/auth/guard";
import { takeOutMember } from "./take-out-member";
import { memberIdSchema } from "@/lib/auth/team-schemas";

/** Takes somebody out of the team, with their keys. Throws AppError "not-found", or "conflict" for the only owner. */
export const removeMember = defineUseCase({
  permission: "team:manage",
  input: memberIdSchema,
  run: ({ scope }, { userId }) => takeOutMember({ teamId: scope.teamId, actorId: scope.userId, userId }),
});
