/** Loads the comparison of departures. */
export const loadWindow = () => import("./WindowView.tsx").then(({ WindowView }) => WindowView);
