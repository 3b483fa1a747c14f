/** Lets the page draw and listen between two pieces of work that each take a while. */
export const pause = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));
