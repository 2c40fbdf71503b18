import { operations } from "@/lib/api/contract";
import { apiMethods, apiRoute } from "@/lib/api/route";
import { createMachine } from "@/lib/use-cases/machines/create-machine";
import { listMachines } from "@/lib/use-cases/machines/list-machines";

export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: apiRoute(operations.listMachines, listMachines, { input: ({ query }) => query, answer: (content) => ({ content }) }),
  POST: apiRoute(operations.createMachine, createMachine, { input: ({ body }) => body, answer: (content) => ({ content }) }),
});
