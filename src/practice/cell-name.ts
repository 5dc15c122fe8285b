/** Row 3, column 1, both from 0, as a person writes it: "B4". */
export function cellName(row: number, column: number): string {
  let letters = "";
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  return `${letters}${row + 1}`;
}
