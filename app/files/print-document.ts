import type { Document } from '../../core/sheet/drawing.ts';
import { HostFault } from '../contract/dispatch.ts';
import { checkedDocument } from '../contract/drawing-form.ts';

/** The same drawing gives the same bytes, so no file of ours says when it was made: the sheets themselves carry their dates. */
const CREATED = new Date(0);

/** A drawing that a page sent, as PDF. @throws {HostFault} when it has not the form of a drawing */
export async function printDocument(value: unknown): Promise<Uint8Array> {
  const document = checkedDocument(value);
  if (!document) throw new HostFault('bad-request', 'this is not a drawing that can be printed');
  return pdfOf(document);
}

/** A drawing of our own making as PDF, without the look over that one from a page needs. */
export async function pdfOf(document: Document): Promise<Uint8Array> {
  const { writePdf } = await import('../pdf/write-pdf.ts');
  return writePdf(document, { created: CREATED });
}

/** The first page of a drawing that a page sent, as PNG. @throws {HostFault} when it has not the form of one, or is too large */
export async function imageDocument(value: unknown, dpi: number): Promise<Uint8Array> {
  const [page] = checkedDocument(value)?.pages ?? [];
  if (!page) throw new HostFault('bad-request', 'this is not a drawing that can be made an image');
  const { writePng } = await import('../pdf/write-png.ts');
  try {
    return await writePng(page, dpi);
  } catch (error) {
    if (error instanceof RangeError) throw new HostFault('bad-request', error.message);
    throw error;
  }
}
