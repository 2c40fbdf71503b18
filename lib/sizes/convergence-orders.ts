import type { Discretisation } from "@/lib/questionnaire/answer-sets";

/**
 * Orders of convergence in L2 for smooth solutions as h falls. Mixed virtual elements and Brezzi-Douglas-Marini elements of degree k: velocity k + 1, pressure k;
 * Raviart-Thomas and tensor-product face elements numbered from 1: r and r.
 */
export function convergenceOrders(discretisation: Discretisation, degree: number): { velocity: number; pressure: number } {
  const full = discretisation === "vem-mixed" || discretisation === "bdm";
  return { velocity: full ? degree + 1 : degree, pressure: degree };
}
