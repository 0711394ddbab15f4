/** Every sentence a user reads in English. */
export * from "./en/headings";
export * from "./en/issues";
export * from "./en/readings";
export * from "./en/pane";
