export * from "./auth";
export * from "./cases";
export * from "./roles";
export * from "./rulebook";
export * from "./runs";
