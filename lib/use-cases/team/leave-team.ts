import { z } from "zod";
import { defineUseCase } from "@/lib/auth/guard";
import { AppError } from "@/lib/shared/app-error";
import { takeOutMember } from "./take-out-member";

/** The actor leaves the team. Throws AppError "conflict" for the only owner. */
export const leaveTeam = defineUseCase({
  permission: "team:read",
  input: z.strictObject({}),
  run: ({ scope, actor }) => {
    // A key with scope read must not be able to end its maker's membership.
    if (actor.via.kind === "key") throw new AppError("forbidden", "A key can't leave a team.");
    return takeOutMember({ teamId: scope.teamId, actorId: scope.userId, userId: scope.userId });
  },
});
