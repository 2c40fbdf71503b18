import { z } from "zod";
import { machineSchema } from "@/lib/questionnaire/machine";
import { defineOperation } from "../operation";
import { idParams, instantSchema, listOf, pageQuery } from "./common";

export const machineViewSchema = z.object({
  ...machineSchema.shape,
  id: z.string(),
  demonstration: z.boolean(),
  /** Cases whose questionnaire names the sheet. */
  cases: z.int(),
  createdAt: instantSchema,
});
export type MachineView = z.infer<typeof machineViewSchema>;

export const machineOperations = {
  listMachines: defineOperation({
    id: "listMachines",
    method: "GET",
    path: "/api/v1/machines",
    tag: "Machines",
    summary: "Machine sheets of the team by name",
    permission: "machines:read",
    query: pageQuery,
    response: { kind: "json", schema: listOf(machineViewSchema) },
  }),
  createMachine: defineOperation({
    id: "createMachine",
    method: "POST",
    path: "/api/v1/machines",
    tag: "Machines",
    summary: "Save a machine sheet",
    permission: "machines:add",
    body: { kind: "json", schema: machineSchema },
    status: 201,
    response: { kind: "json", schema: machineViewSchema },
  }),
  updateMachine: defineOperation({
    id: "updateMachine",
    method: "PATCH",
    path: "/api/v1/machines/{id}",
    tag: "Machines",
    summary: "Change a machine sheet; advice already given keeps the figures it was given with",
    permission: "machines:manage",
    params: idParams,
    body: { kind: "json", schema: machineSchema.partial() },
    response: { kind: "json", schema: machineViewSchema },
  }),
  deleteMachine: defineOperation({
    id: "deleteMachine",
    method: "DELETE",
    path: "/api/v1/machines/{id}",
    tag: "Machines",
    summary: "Delete a machine sheet that no case names",
    permission: "machines:manage",
    params: idParams,
    response: { kind: "json", schema: z.object({ id: z.string() }) },
  }),
};
