import type { Email } from "./email";
import { letterHtml, letterText, type Letter } from "./layout";

type EditionLetter = {
  to: string;
  teamName: string;
  number: number;
  note: string;
  submitterName: string;
  /** Null when the submitter published alone. */
  approverName: string | null;
  /** One line for each rule that differs. */
  changes: readonly string[];
  url: string;
};

/** A letter names this many changes; the page has them all. */
const mostChanges = 12;
const longestChange = 300;

/** Tells a member that a new edition of the rulebook is live, and what it changes. */
export function editionEmail({ to, teamName, number, note, submitterName, approverName, changes, url }: EditionLetter): Email {
  const who = approverName === null ? `${submitterName} submitted it and, as the only curator, published it alone.` : `${submitterName} submitted it, ${approverName} approved it.`;
  const letter: Letter = {
    greeting: "Hello,",
    paragraphs: [
      `Edition ${number} of the rulebook of ${teamName} is live: advice follows it from now on; advice already given stays as it was. ${who}`,
      ...(note === "" ? [] : [`Note: ${note}`]),
      changes.length === 0 ? "It says the same as the edition before." : "What changed:",
      ...changes.slice(0, mostChanges).map((change) => (change.length > longestChange ? `${change.slice(0, longestChange)}…` : change)),
      ...(changes.length > mostChanges ? [`And ${changes.length - mostChanges} more.`] : []),
    ],
    link: { label: "Read the edition", url },
    closing: `You get this letter as a member of the team ${teamName}.`,
  };
  return { to, subject: subjectOf(number, teamName), text: letterText(letter), html: letterHtml(letter) };
}

/** Subjects are one line of at most 200 characters. */
function subjectOf(number: number, teamName: string): string {
  return `Edition ${number} of the rulebook of ${teamName} is live`.replaceAll(/\s+/g, " ").slice(0, 200);
}
