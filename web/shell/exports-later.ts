/** What writes leg tables, loaded when one is first asked for. */
export const exportsLater = () => import("./exports.ts");
