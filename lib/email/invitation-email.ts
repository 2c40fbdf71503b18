import type { Role } from "@/lib/auth/permissions";
import type { Email } from "./email";
import { letterHtml, letterText, type Letter } from "./layout";

const rights: Record<Role, string> = {
  owner: "manage members, machines and keys, and do everything else",
  curator: "edit the rulebook and record cases and runs",
  analyst: "record cases and runs",
  observer: "read everything of the team",
};

/** The letter with the link into a team. */
export function invitationEmail(input: { to: string; inviterName: string; teamName: string; role: Role; url: string; days: number }): Email {
  const letter: Letter = {
    greeting: "Hello,",
    paragraphs: [
      `${input.inviterName} invites you to the team ${input.teamName} at Saddlemark as ${input.role}: you could ${rights[input.role]}.`,
      `The invitation is for ${input.to} and holds for ${input.days} days.`,
    ],
    link: { label: "Open the invitation", url: input.url },
    closing: "If you don't know the sender, leave this letter alone: nothing happens without you.",
  };
  return { to: input.to, subject: clip(`Invitation to the team ${input.teamName}`), text: letterText(letter), html: letterHtml(letter) };
}

/** Subjects are one line of at most 200 characters. */
function clip(subject: string): string {
  return subject.replaceAll(/\s+/g, " ").slice(0, 200);
}
