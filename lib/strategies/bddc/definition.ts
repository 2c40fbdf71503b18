import type { StrategyDefinition } from "../strategy";
import { cost } from "./cost";
import { options, recipe } from "./options";

export const definition: StrategyDefinition = {
  id: "bddc",
  name: "BDDC / FETI-DP",
  summary: "Balancing domain decomposition by constraints on the saddle-point system in the benign space.",
  needs: ["unassembled-subdomains"],
  discretisations: ["vem-mixed", "rt", "bdm", "rt-hex"],
  notForReason: "",
  krylovMethod: "cg",
  monitoredNorm: "natural",
  parameters: [],
  weakSpots: [
    "Needs unassembled subdomain matrices and constraints that keep the divergence-free subspace.",
    "On very many cores the coarse problem decides.",
    "Jumps inside a subdomain's faces need deluxe scaling or adaptive constraints.",
  ],
  fallback: { strategy: "schur-diag-amg", when: "The condition number that CG estimates exceeds a hundred." },
  cost,
  options,
  recipe,
};
