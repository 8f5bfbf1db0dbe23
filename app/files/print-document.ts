import { HostFault } from '../contract/dispatch.ts';
import { checkedDocument } from '../contract/drawing-form.ts';

/** The same drawing gives the same bytes, so no file of ours says when it was made: the sheets themselves carry their dates. */
const CREATED = new Date(0);

/** A drawing that a page sent, as PDF. @throws {HostFault} when it has not the form of a drawing */
export async function printDocument(value: unknown): Promise<Uint8Array> {
  const document = checkedDocument(value);
  if (!document) throw new HostFault('bad-request', 'this is not a drawing that can be printed');
  const { writePdf } = await import('../pdf/write-pdf.ts');
  return writePdf(document, { created: CREATED });
}
