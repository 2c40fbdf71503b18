export * from "./auth";
export * from "./cases";
export * from "./drafts";
export * from "./intake";
export * from "./roles";
export * from "./rulebook";
export * from "./runs";
