import { apiHeaders } from "./responses";

type TextStream = { pieces: AsyncGenerator<string>; mediaType: string; filename: string };

/** An answer written piece by piece, as fast as it is read and no faster; it ends when the reader goes away. */
export function streamResponse({ pieces, mediaType, filename }: TextStream): Response {
  const encoder = new TextEncoder();
  const body = new ReadableStream<Uint8Array>({
    async pull(controller) {
      try {
        const { done, value } = await pieces.next();
        if (done) controller.close();
        else controller.enqueue(encoder.encode(value));
      } catch (error) {
        // The status is long sent: breaking the stream is the only way left to say that it is not whole.
        console.error(`api: a streamed answer broke off: ${error instanceof Error ? error.name : typeof error}`);
        controller.error(error);
      }
    },
    async cancel() {
      await pieces.return(undefined);
    },
  });
  return new Response(body, { headers: { ...apiHeaders, "content-type": mediaType, "content-disposition": `attachment; filename="${filename}"` } });
}

/** A small text as a file; `filename` is made of plain characters only. */
export function textResponse({ text, mediaType, filename }: { text: string; mediaType: string; filename: string }): Response {
  const safeName = filename.replace(/[^A-Za-z0-9._-]/g, "-");
  return new Response(text, { headers: { ...apiHeaders, "content-type": `${mediaType}; charset=utf-8`, "content-disposition": `attachment; filename="${safeName}"` } });
}

/** A gzipped archive as a file. */
export function archiveResponse({ bytes, filename }: { bytes: Uint8Array<ArrayBuffer>; filename: string }): Response {
  const safeName = filename.replace(/[^A-Za-z0-9._-]/g, "-");
  return new Response(bytes, { headers: { ...apiHeaders, "content-type": "application/gzip", "content-disposition": `attachment; filename="${safeName}"` } });
}
