import { keepString } from "@/lib/logs/keep-string";
import type { Outcome } from "@/lib/runs/run";

/** Why a program ended otherwise than by a linear solve's own verdict. `outcome` null: the cause is left open. */
export type Failure = { outcome: Outcome | null; line: number; reason: string; text: string };

type Sign = { pattern: RegExp; outcome: Outcome | null; reason: string; text: string };

/** Schedulers, the kernel and MPI; the first sign counts. Common practice, no source. */
const signs: readonly Sign[] = [
  { pattern: /\bDUE TO TIME LIMIT\b|\bexceeded (?:its )?(?:wall ?time|time) limit\b|=>> PBS: job killed: walltime|TERM_RUNLIMIT/i, outcome: "over-time", reason: "TIME_LIMIT", text: "The batch system ended the job at its time limit." },
  { pattern: /\boom[-_ ]kill|\bOut Of Memory\b.*\bkill|\bOUT_OF_MEMORY\b|\bExceeded job memory limit\b|TERM_MEMLIMIT/i, outcome: "out-of-memory", reason: "MEMORY_LIMIT", text: "The batch system or the kernel ended the job for want of memory." },
  { pattern: /\bstd::bad_alloc\b|\bCannot allocate memory\b/i, outcome: "out-of-memory", reason: "ALLOCATION_FAILED", text: "An allocation failed." },
];

/** Cheap test before the signs are tried one by one. */
const anySign = /TIME|time|memory|Memory|MEM|OUT_OF|oom|OOM|bad_alloc|walltime/;

const kinds: Record<string, { outcome: Outcome | null; text: string }> = {
  "Out of memory": { outcome: "out-of-memory", text: "PETSc could not allocate memory." },
  "Zero pivot in LU factorization": { outcome: "broken", text: "A zero pivot stopped the factorisation." },
  "Zero pivot in Cholesky factorization": { outcome: "broken", text: "A zero pivot stopped the factorisation." },
  "Error in external library": { outcome: "broken", text: "A library called by PETSc failed." },
  "Object is in wrong state": { outcome: "broken", text: "PETSc refused to start the solve." },
};

const petscLine = /^\[(\d{1,8})\] ?(?:PETSC ERROR: ?)?(.*)$/;
const pythonCode = /^(?:petsc4py\.PETSc\.Error: )?error code (\d{1,4})$/;

/** Messages of one error: the frames of the call stack carry `at ./file.c:line`, the rest is the message. */
function isFrame(message: string): boolean {
  return /\(\) (?:at|line) /.test(message) || /^#\d/.test(message);
}

/** Collects what a program says when it stops otherwise than by the verdict of a linear solve. */
export class FailureReader {
  private readonly messages: { text: string; line: number }[] = [];
  private batch: Failure | null = null;
  private banner: number | null = null;
  private closed = false;
  private signalled: { text: string; line: number } | null = null;
  private readonly codes: { code: number; detail: number | null; line: number }[] = [];

  private readPetsc(message: string, line: number, isBanner: boolean): void {
    if (isBanner) this.banner ??= line;
    // Rules and stars end a message: what follows is other output.
    else if (/^[*=-]{3}/.test(message)) this.closed = this.messages.length > 0;
    if (this.closed) return;
    if (/^-+ ?Error Message|^-{10,}|^See https?:|^Configure options|^Petsc (?:Release|Development)|^\S+ on a \S* ?named /.test(message) || message === "") return;
    if (/^Caught signal number/.test(message)) this.signalled ??= { text: keepString(message.slice(0, 200)), line };
    const code = /INFOG?\(1\)= ?(-?\d{1,9})(?:, INFOG?\(2\)= ?(-?\d{1,18}))?$/.exec(message);
    if (code !== null && this.codes.length < 20) {
      this.codes.push({ code: Number(code[1]), detail: code[2] === undefined ? null : Number(code[2]), line });
    }
    if (!isFrame(message) && this.messages.length < 12 && /[a-z]/.test(message)) this.messages.push({ text: keepString(message.slice(0, 300)), line });
  }

  /** Takes error banners of any rank and the batch system's own lines; false for all other lines. */
  take(text: string, line: number): boolean {
    const code = text.charCodeAt(0);
    if (code === 91) {
      const match = petscLine.exec(text);
      const isBanner = text.includes("PETSC ERROR");
      if (match !== null && (isBanner || this.banner !== null)) {
        this.readPetsc((match[2] ?? "").trim(), line, isBanner);
        return true;
      }
    }
    const python = pythonCode.exec(text);
    if (python !== null) {
      this.banner ??= line;
      return true;
    }
    if (this.batch !== null || text.length > 600 || !anySign.test(text)) return false;
    const sign = signs.find(({ pattern }) => pattern.test(text));
    if (sign !== undefined) this.batch = { outcome: sign.outcome, line, reason: sign.reason, text: sign.text };
    return sign !== undefined;
  }

  /** MUMPS' error code as PETSc passes it on. */
  get mumpsCode(): { code: number; detail: number | null; line: number } | null {
    return this.codes[0] ?? null;
  }

  failure(): Failure | null {
    if (this.batch !== null) return this.batch;
    if (this.signalled !== null && /^Caught signal number (?:15|24)/.test(this.signalled.text)) {
      return { outcome: null, line: this.signalled.line, reason: this.signalled.text, text: "The program was told to end; the log does not say why." };
    }
    if (this.signalled !== null) return { outcome: "broken", line: this.signalled.line, reason: this.signalled.text, text: "The program crashed." };
    const [first] = this.messages;
    if (this.banner === null) return null;
    if (first === undefined) return { outcome: "broken", line: this.banner, reason: "ERROR", text: "PETSc reported an error without a message." };
    const kind = Object.entries(kinds).find(([name]) => this.messages.some(({ text }) => text.startsWith(name)));
    const joined = this.messages.slice(0, 3).map(({ text }) => text).join(": ").slice(0, 390);
    return { outcome: kind?.[1].outcome ?? "broken", line: first.line, reason: joined, text: kind?.[1].text ?? "PETSc stopped with an error." };
  }
}
