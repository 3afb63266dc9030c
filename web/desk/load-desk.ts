/** Loads the pane of the desk's questions. */
export const loadDesk = () => import("./DeskPane.tsx").then(({ DeskPane }) => DeskPane);
