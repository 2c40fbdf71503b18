import type { Email } from "./email";
import { letterHtml, letterText, type Letter } from "./layout";

/** The letter with the link to choose a new password. */
export function resetEmail(input: { to: string; name: string; url: string; minutes: number }): Email {
  const letter: Letter = {
    greeting: `Hello ${input.name},`,
    paragraphs: [`somebody asked to choose a new password for ${input.to} at Saddlemark.`, `The link works once, within ${input.minutes} minutes.`],
    link: { label: "Choose a new password", url: input.url },
    closing: "If it was not you, leave this letter alone: your password stays as it is.",
  };
  return { to: input.to, subject: "Choose a new password for Saddlemark", text: letterText(letter), html: letterHtml(letter) };
}
