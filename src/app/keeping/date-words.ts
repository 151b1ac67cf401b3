const format = new Intl.DateTimeFormat(undefined, { dateStyle: "medium", timeStyle: "short" });

export const dateWords = (at: number): string => format.format(at);
