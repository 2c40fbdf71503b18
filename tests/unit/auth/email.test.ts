import { createTransport } from "nodemailer";
import { describe, expect, it } from "vitest";
import { emailSchema } from "@/lib/email/email";
import { invitationEmail } from "@/lib/email/invitation-email";
import { parseMessage } from "@/lib/email/parse-message";
import { resetEmail } from "@/lib/email/reset-email";

const reset = resetEmail({ to: "ada@example.org", name: "Ada", url: "https://example.org/reset-password?token=a&b=c", minutes: 60 });
const invitation = (teamName: string) =>
  invitationEmail({ to: "guest@example.org", inviterName: "Ada <Brook>", teamName, role: "analyst", url: "https://example.org/invitation/x", days: 7 });

describe("letters", () => {
  it.each([["reset", reset], ["invitation", invitation("Brook works")]])("%s can be sent and carries its link in text and HTML", (_, email) => {
    expect(emailSchema.parse(email)).toEqual(email);
    expect(email.text).toMatch(/\nhttps:\/\/example\.org\/\S+\n/);
    expect(email.html).toMatch(/<a href="https:\/\/example\.org\/[^"]+"/);
    expect(email.html).toContain("Saddlemark");
  });

  it("show what people typed as text, never as HTML", () => {
    const { html } = invitation(`<img src=x onerror="alert(1)">`);
    expect(html).not.toContain("<img");
    expect(html).toContain("&lt;img src=x onerror=&quot;alert(1)&quot;&gt;");
    expect(html).toContain("Ada &lt;Brook&gt;");
  });

  it("keep a subject in one line, so that nobody can add headers", () => {
    expect(invitation("Works\r\nBcc: everyone@example.org").subject).toBe("Invitation to the team Works Bcc: everyone@example.org");
  });
});

describe("a message as nodemailer writes it", () => {
  // The outside check: nodemailer composes, ours reads.
  async function compose(email: { subject: string; text?: string; html?: string; textEncoding?: "quoted-printable" | "base64" }): Promise<string> {
    const { message } = await createTransport({ streamTransport: true, buffer: true }).sendMail({ from: "Saddlemark <a@example.org>", to: "b@example.org", ...email });
    if (!Buffer.isBuffer(message)) throw new Error("A buffer was asked for.");
    return message.toString("latin1");
  }

  it.each([
    ["plain", { subject: "Hello", text: "One line.\n" }],
    ["umlauts", { subject: "Grüße an Zoë – 3 × 4", text: "Äußerst schöne Grüße\n" }],
    ["a long line", { subject: "x", text: `${"word ".repeat(60)}end\n` }],
    ["a long link", { subject: "x", text: `https://example.org/reset-password?token=${"a1=".repeat(60)}\n` }],
    ["a very long subject", { subject: "Invitation to the team of the brooks, rivers and the sea – Grüße ".repeat(3).trim(), text: "x\n" }],
    ["base64", { subject: "x", text: "Grüße\n", textEncoding: "base64" as const }],
    ["blank lines", { subject: "x", text: "a\n\n\nb = c\n" }],
  ])("%s is read back whole", async (_, email) => {
    expect(parseMessage(await compose(email))).toMatchObject({ subject: email.subject, text: email.text });
  });

  it("in two forms is read back in both", async () => {
    const parsed = parseMessage(await compose(reset));
    expect(parsed.text).toBe(reset.text);
    expect(parsed.html).toBe(reset.html);
  });

  it.each(["", "nonsense", "Content-Type: multipart/mixed; boundary=x\n\n--x\n", "\n\n\n", "Content-Type: multipart/alternative\n\nx"])("%j is no reason to fail", (raw) => {
    expect(parseMessage(raw)).toMatchObject({ html: "" });
  });
});
