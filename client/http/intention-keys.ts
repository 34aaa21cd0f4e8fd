import { z } from "zod";
import { newId } from "../case/new-id.ts";

const storageName = "ebbline.intentions";
const remembered = 40;
const Kept = z.array(z.strictObject({ intention: z.string(), key: z.uuid() }));

/**
 * The idempotency key of one write: the same path and body give the same key until the write is known to
 * be done, also after a reload, so that a retry after a lost answer is recognised by the server.
 */
export function keyFor(path: string, body: unknown): string {
  const intention = fingerprint(`${path}\n${JSON.stringify(body)}`);
  const kept = read();
  const known = kept.find((entry) => entry.intention === intention);
  if (known !== undefined) return known.key;
  const key = newId();
  write([...kept, { intention, key }].slice(-remembered));
  return key;
}

/** Once done, the same words said again are a new intention. */
export function doneWith(key: string): void {
  write(read().filter((entry) => entry.key !== key));
}

function read(): z.infer<typeof Kept> {
  try {
    const kept = Kept.safeParse(JSON.parse(localStorage.getItem(storageName) ?? "[]"));
    return kept.success ? kept.data : [];
  } catch {
    return [];
  }
}

/** A browser without storage still saves; it only cannot recognise its own retry after a reload. */
function write(entries: z.infer<typeof Kept>): void {
  try {
    localStorage.setItem(storageName, JSON.stringify(entries));
  } catch {
    // Storage full or switched off.
  }
}

/**
 * Tells one write from another within one browser: length and two 32-bit FNV-1a sums (Fowler, Noll and Vo;
 * from memory). Not for secrets; a clash would be refused by the server, which compares the whole request.
 */
function fingerprint(text: string): string {
  let one = 0x811c9dc5;
  let two = 0x01000193;
  for (let index = 0; index < text.length; index++) {
    one = Math.imul(one ^ text.charCodeAt(index), 0x01000193);
    two = Math.imul(two ^ text.charCodeAt(text.length - 1 - index), 0x01000193);
  }
  return `${text.length}-${one >>> 0}-${two >>> 0}`;
}
