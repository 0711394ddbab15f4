/** The sentences of the page without Excel. */
export const pageWords = {
  /** What an error of the spreadsheet itself means, for those that a newcomer meets here. */
  gridErrors: {
    "#SPILL!":
      "The result needs room, and something stands in it. Clear the cells below and to the right, or move the formula.",
    "#NAME?": "There is no function or name like this. Our functions begin with COMOVE and a full stop.",
    "#REF!": "The formula points at cells that are not there, or at a spill that is not there now.",
  } as Readonly<Record<string, string>>,
  blanksTitle: "To try: a blank cell arrives as",
  blanksNothing: "nothing",
  blanksZero: "0, as on some older clients",
  broken: "The sheet could not be opened. Reload the page; if that does not help, build it anew.",
} as const;
