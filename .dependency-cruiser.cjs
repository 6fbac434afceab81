const ROOMS = ["units", "geometry", "drawing", "parts", "fit", "nesting", "toolpath", "pricing", "scheduling", "shipping"];
/** What `orders` may be built on, and who may take its types. */
const BESIDE = { below: ["units"], above: ["pricing", "scheduling", "shipping"] };

const roomRules = ROOMS.map((room, index) => ({
  name: `${room}-imports-only-rooms-to-its-left`,
  severity: "error",
  from: { path: `^app/domain/${room}/` },
  to: {
    path: "^app/domain/",
    pathNot: [
      `^app/domain/${room}/`,
      ...ROOMS.slice(0, index).map((left) => `^app/domain/${left}/index\\.ts$`),
      ...(BESIDE.above.includes(room) ? ["^app/domain/orders/index\\.ts$"] : []),
    ],
  },
}));

module.exports = {
  forbidden: [
    ...roomRules,
    {
      name: "orders-stands-beside-the-rooms",
      severity: "error",
      from: { path: "^app/domain/orders/" },
      to: {
        path: "^app/domain/",
        pathNot: ["^app/domain/orders/", ...BESIDE.below.map((room) => `^app/domain/${room}/index\\.ts$`)],
      },
    },
    {
      name: "domain-knows-nothing-outside",
      comment: "No React, router, Drizzle, Node or environment: a room runs in a worker, a browser and a test alike.",
      severity: "error",
      from: { path: "^app/domain/" },
      to: {
        path: ["^app/(?!domain/)", "^fakes/", "^node_modules/(react|react-dom|react-router|@react-router|drizzle-orm|@libsql|stripe|@aws-sdk|nodemailer|express)/"],
      },
    },
    {
      name: "domain-without-node",
      severity: "error",
      from: { path: "^app/domain/" },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "rooms-are-entered-by-their-index",
      severity: "error",
      from: { path: "^(app|tests)/", pathNot: ["^app/domain/", "^tests/domain/"] },
      to: { path: "^app/domain/[^/]+/.+", pathNot: ["^app/domain/[^/]+/index\\.ts$"] },
    },
    {
      name: "only-models-touch-tables",
      severity: "error",
      from: { path: "^app/", pathNot: ["^app/(models|db)/", "^app/auth/"] },
      to: { path: ["^app/db/schema/"], dependencyTypesNot: ["type-only"] },
    },
    {
      name: "models-know-no-flows",
      severity: "error",
      from: { path: "^app/models/" },
      to: { path: "^app/(flows|routes|services|documents|jobs|components)/" },
    },
    {
      name: "flows-know-no-routes",
      severity: "error",
      from: { path: "^app/flows/" },
      to: { path: "^app/(routes|components|server)/", pathNot: ["^app/server/environment\\.server\\.ts$"] },
    },
    {
      name: "services-stand-alone",
      severity: "error",
      from: { path: "^app/services/" },
      to: { path: "^app/(flows|routes|models|jobs|documents|components|db)/" },
    },
    {
      name: "components-know-no-server",
      severity: "error",
      from: { path: "^app/components/" },
      to: { path: ["^app/(flows|routes|services|models|jobs|db|auth|server)/", "\\.server\\.ts$"], dependencyTypesNot: ["type-only"] },
    },
    {
      name: "the-product-does-not-import-its-fakes",
      severity: "error",
      from: { path: "^app/", pathNot: ["^app/commands/"] },
      to: { path: "^fakes/" },
    },
    { name: "no-circles", severity: "error", from: { path: "^(app|fakes)/" }, to: { circular: true, viaOnly: { dependencyTypesNot: ["type-only"] } } },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "^(build|\\.react-router)/|\\?node-worker$" },
    tsConfig: { fileName: "tsconfig.json" },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: { extensions: [".ts", ".tsx", ".mjs", ".js", ".json"] },
  },
};
