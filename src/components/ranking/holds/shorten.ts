/** A text that fits its place in a chart; the table beside the chart has it whole. */
export const shortened = (text: string, most: number): string =>
  text.length <= most ? text : `${text.slice(0, most - 1).trimEnd()}…`;
