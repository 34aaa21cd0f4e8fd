import type { RequestHandler } from "express";
import { RequestError } from "../request-errors.ts";

/** Refuses addresses with a bad escape or a control character, which would otherwise reach a handler as an id. */
export const readablePath: RequestHandler = (request, _response, next) => {
  if (!isReadable(request.path))
    throw new RequestError(
      "malformed-path",
      "the address has an escape that is not complete, not UTF-8, or a control character",
    );
  next();
};

function isReadable(path: string): boolean {
  try {
    // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is looked for
    return !/[\u0000-\u001f\u007f]/.test(decodeURIComponent(path));
  } catch {
    return false;
  }
}
