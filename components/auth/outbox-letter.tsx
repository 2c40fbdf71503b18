import { formatDateTime } from "@/lib/shared/format-date";

type Letter = { subject: string; from: string; to: readonly string[]; receivedAt: string; text: string };

/** One kept letter, its text as sent, its links to be followed. */
export function OutboxLetter({ letter }: { letter: Letter }) {
  return (
    <article className="grid grid-cols-1 gap-2 border border-hairline px-4 py-3">
      <h2 className="text-lg font-semibold">{letter.subject}</h2>
      <p className="text-sm text-faint">
        To {letter.to.join(", ")} · {formatDateTime(letter.receivedAt)}
      </p>
      <div className="text-sm [overflow-wrap:anywhere] whitespace-pre-wrap">{letter.text.split(/(https?:\/\/\S+)/).map((piece, index) => (index % 2 === 0 ? piece : <LetterLink key={index} url={piece} />))}</div>
    </article>
  );
}

function LetterLink({ url }: { url: string }) {
  return (
    <a href={url} className="text-water underline underline-offset-3">
      {url}
    </a>
  );
}
