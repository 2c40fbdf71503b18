import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { deleteMachine } from "@/lib/use-cases/machines/delete-machine";
import { updateMachine } from "@/lib/use-cases/machines/update-machine";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  PATCH: apiRoute(operations.updateMachine, updateMachine, { input: ({ params, body }) => ({ id: params.id, changes: body }), answer: (content) => ({ content }) }),
  DELETE: apiRoute(operations.deleteMachine, deleteMachine, { input: ({ params }) => params, answer: (content) => ({ content }) }),
});
