/** Krylov methods of PETSc, by the names its solver view prints. Other names are taken for damaged. */
export const krylovTypes = new Set([
  "richardson", "chebyshev", "cg", "groppcg", "pipecg", "pipecgrr", "pipelcg", "pipeprcg", "pipecg2", "cgne", "nash", "stcg", "gltr",
  "cgls", "fcg", "pipefcg", "gmres", "pipefgmres", "fgmres", "lgmres", "dgmres", "pgmres", "tcqmr", "bcgs", "ibcgs", "qmrcgs", "fbcgs",
  "fbcgsr", "bcgsl", "pipebcgs", "cgs", "tfqmr", "cr", "pipecr", "lsqr", "preonly", "none", "qcg", "bicg", "minres", "symmlq", "lcd",
  "gcr", "pipegcr", "tsirm", "fetidp", "hpddm", "python",
]);

/** Preconditioners of PETSc, likewise. */
export const preconditionerTypes = new Set([
  "none", "jacobi", "sor", "lu", "qr", "shell", "amgx", "bjacobi", "vpbjacobi", "pbjacobi", "mg", "eisenstat", "ilu", "icc", "asm", "gasm",
  "ksp", "composite", "redundant", "spai", "nn", "cholesky", "mat", "hypre", "parms", "fieldsplit", "tfs", "ml", "galerkin", "exotic", "cp",
  "bfbt", "lsc", "python", "pfmg", "smg", "syspfmg", "redistribute", "svd", "gamg", "bicgstabcusp", "bddc", "kaczmarz", "telescope",
  "patch", "lmvm", "hmg", "deflation", "hpddm", "h2opus", "mpi",
]);

/** Packages that factorise for PETSc (its solver types). */
export const factorPackages = new Set([
  "petsc", "mumps", "superlu", "superlu_dist", "strumpack", "umfpack", "cholmod", "klu", "spqr", "essl", "lusol", "matlab", "pastix",
  "bas", "cusparse", "mkl_pardiso", "mkl_cpardiso", "sparseelemental", "elemental", "scalapack", "htool", "hip", "kokkos",
]);
