import { existsSync } from "node:fs";
import { dirname, join } from "node:path";

/**
 * The folder that holds package.json. The compiler emits to .build/ and copies no .sql or .css, so files
 * that are read at run time are found from here, by the built program and by a test of the sources alike.
 */
export function projectFolder(): string {
  let folder = import.meta.dirname;
  while (!existsSync(join(folder, "package.json"))) {
    const parent = dirname(folder);
    if (parent === folder) throw new Error("no package.json above the program: the installation is not whole");
    folder = parent;
  }
  return folder;
}
