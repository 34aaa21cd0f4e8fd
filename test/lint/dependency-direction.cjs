/** Who may know whom: shared <- db <- server; shared <- client. */
const inside = (folder) => `^${folder}/`;

/** @type {import("dependency-cruiser").IConfiguration} */
module.exports = {
  forbidden: [
    {
      name: "shared-stands-alone",
      severity: "error",
      from: { path: inside("shared") },
      to: { path: "^(client|db|server|test)/" },
    },
    {
      name: "db-knows-only-shared",
      severity: "error",
      from: { path: inside("db") },
      to: { path: "^(client|server|test)/" },
    },
    { name: "server-not-client", severity: "error", from: { path: inside("server") }, to: { path: "^(client|test)/" } },
    {
      name: "client-knows-only-shared",
      severity: "error",
      from: { path: inside("client") },
      to: { path: "^(db|server|test)/" },
    },
    {
      name: "shared-is-pure",
      comment: "No input, output, clock or randomness: it runs in a page, a server, a worker and a test.",
      severity: "error",
      from: { path: inside("shared") },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "kinetics-only-types-of-contract",
      comment: "The engine must not bring the schemas into the page.",
      severity: "error",
      from: { path: "^shared/kinetics/" },
      to: { path: "^shared/contract/", dependencyTypesNot: ["type-only"] },
    },
    {
      name: "no-cycles",
      severity: "error",
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ["type-only"] } },
    },
    {
      name: "no-tools-in-the-product",
      severity: "error",
      from: { path: "^(shared|db|server|client)/", pathNot: "(vite\\.config\\.ts|start\\.mjs)$" },
      to: { dependencyTypes: ["npm-dev"] },
    },
    { name: "everything-is-there", severity: "error", from: {}, to: { couldNotResolve: true } },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "(^|/)\\.build/" },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "client/tsconfig.json" },
    enhancedResolveOptions: {
      exportsFields: ["exports"],
      conditionNames: ["import", "require", "node", "default", "types"],
    },
  },
};
