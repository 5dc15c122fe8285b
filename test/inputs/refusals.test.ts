import { describe, expect, it } from "vitest";
import { checkSite, InputError, parseSite } from "../../src/inputs/index.js";
import { add, put, refusalOf, SMALL, without, withoutGrid, type Row } from "./block.js";

/** [what is wrong, the block, the sentence]. refusalOf checks that parseSite and the check rows say the very same. */
type Refusal = readonly [string, unknown, string];

const list = (label: string, ...rows: Row[]) => add(SMALL, [label], ...rows);
const piles = (...rows: Row[]) => add(withoutGrid(SMALL), ["Pile list"], ...rows);
const layers = (...rows: Row[]) => add(without(SMALL, "Mean stiffness", "Stiffness COV"), ["Layer list"], ...rows);
const column = (rows: number) => Array.from({ length: rows }, () => ["Stiffness COV"]);

const SHAPES: readonly Refusal[] = [
  ["one cell", [["Mean stiffness"]], "The site block is one cell; mark the range that holds labels, values, units and notes."],
  ["one cell without rows", 5, "The site block is one cell; mark the range that holds labels, values, units and notes."],
  ["nothing", [], "The site block is one cell; mark the range that holds labels, values, units and notes."],
  ["one column", column(60), "The site block has one column; mark the columns of labels, values, units and notes."],
  ["too many columns", SMALL.map((row) => [...row, 1, 2, 3]), "The site block has 7 columns; mark the columns of labels, values, units and notes only."],
  ["blank", [["", ""], ["", ""]], "The site block is blank; mark the range that holds labels, values, units and notes."],
  ["section titles alone", [["Ground", ""], ["Piles", ""]], "The site block is blank; mark the range that holds labels, values, units and notes."],
  ["ten thousand rows", [...SMALL, ...Array.from({ length: 9976 }, () => ["", "", "", ""])], "The site block has 10000 rows; mark only the rows that hold inputs, at most 1000."],
];

const LABELS: readonly Refusal[] = [
  ["unknown label, one letter out", add(SMALL, ["Stifness COV", 0.5]), '"Stifness COV" (row 25 of the site block) is not a known label; is "Stiffness COV" meant?'],
  ["unknown label, other order of words", add(SMALL, ["COV of the stiffness", 0.5]), '"COV of the stiffness" (row 25 of the site block) is not a known label; is "Stiffness COV" meant?'],
  ["unknown label, nothing near", add(SMALL, ["Xyzzy", 0.5]), '"Xyzzy" (row 25 of the site block) is not a known label; the check rows list all labels.'],
  ["label twice", add(SMALL, ["mean  stiffness", 9, "MPa"]), "Mean stiffness (row 25 of the site block) is given twice: in row 2 and in row 25; take one of them out."],
  ["list twice", add(SMALL, ["Hole list"], [1, 2], ["Hole list"], [3, 4]), "Hole list (row 27 of the site block) is given twice: in row 25 and in row 27; take one of them out."],
  ["value without a label", add(SMALL, ["", 12, "m"]), "Row 25 of the site block has 12 in its value cell, but no label."],
  ["number for a label", add(SMALL, [7, 12, "m"]), "Row 25 of the site block begins with 7 where a label is expected; the rows of a list stand directly below its label."],
  ["truth value for a label", add(SMALL, [true, 12, "m"]), "Row 25 of the site block begins with TRUE where a label is expected; the rows of a list stand directly below its label."],
  ["error for a label", add(SMALL, ["#REF!", 12, "m"]), "Row 25 of the site block has the error #REF! where a label is expected."],
  ["error without a label", add(SMALL, ["", "#N/A"]), "Row 25 of the site block has the error #N/A in its value cell, but no label."],
  ["section title with a value", add(SMALL, ["Delay", 5]), '"Delay" (row 25 of the site block) is a section title and takes no value, but 5 stands beside it.'],
];

const MISSING: readonly Refusal[] = [
  ["mean", without(SMALL, "Mean stiffness"), 'Mean stiffness is missing: the section Ground needs a row "Mean stiffness" with a number in MPa, or a layer list.'],
  ["COV", without(SMALL, "Stiffness COV"), 'Stiffness COV is missing: the section Ground needs a row "Stiffness COV" with a number or the word none, or a layer list.'],
  ["scale", without(SMALL, "Vertical scale"), 'Vertical scale is missing: the section Ground needs a row "Vertical scale" with a number in m.'],
  ["piles", withoutGrid(SMALL), 'Piles along x is missing: the section Building needs a row "Piles along x" with a number, or a pile list.'],
  ["load", without(SMALL, "Interior load"), 'Interior load is missing: the section Building needs a row "Interior load" with a number in kN, or a pile list.'],
  ["price", without(SMALL, "Price per hole"), 'Price per hole is missing: the section Prices needs a row "Price per hole" with a price or the word none.'],
  ["depth", without(SMALL, "Hole depth"), 'Hole depth is missing: the section Investigation needs a row "Hole depth" with a number in m.'],
  ["own COVs", add(SMALL, ["Method", "own"]), 'Reading COV is missing: Method (row 25 of the site block) is own, so the section Investigation needs a row "Reading COV" with a number, or the word none.'],
];

const NUMBERS: readonly Refusal[] = [
  ["blank price", put(SMALL, "Price per hole", ""), "Price per hole (row 22 of the site block) is blank or zero; write a number, or the word none if it costs nothing."],
  ["zero price", put(SMALL, "Price per hole", 0), "Price per hole (row 22 of the site block) is blank or zero; write a number, or the word none if it costs nothing."],
  ["price of spaces", put(SMALL, "Price per hole", "   "), "Price per hole (row 22 of the site block) is blank or zero; write a number, or the word none if it costs nothing."],
  ["price without a cell", put(SMALL, "Price per hole", null), "Price per hole (row 22 of the site block) is blank or zero; write a number, or the word none if it costs nothing."],
  ["blank, with a default", add(SMALL, ["Pile modulus", "", "GPa"]), "Pile modulus (row 25 of the site block) is blank or zero; write a number, or take the row out for the default (30 GPa)."],
  ["blank COV", put(SMALL, "Stiffness COV", ""), "Stiffness COV (row 3 of the site block) is blank or zero; write a number, or the word none for a deliberate zero."],
  ["none where zero is impossible", put(SMALL, "Pile diameter", "none"), "Pile diameter (row 16 of the site block) is the word none, but it cannot be zero; a number in m is needed."],
  ["text", put(SMALL, "Mean stiffness", "soft"), 'Mean stiffness (row 2 of the site block) is the text "soft"; a number in MPa is needed.'],
  ["text on two lines", put(SMALL, "Mean stiffness", "soft\r\n\t clay\u0000"), 'Mean stiffness (row 2 of the site block) is the text "soft clay"; a number in MPa is needed.'],
  ["text in a price", put(SMALL, "Price per hole", "ask Jo"), 'Price per hole (row 22 of the site block) is the text "ask Jo"; a number is needed.'],
  ["number with its unit", put(SMALL, "Mean stiffness", "8 MPa"), 'Mean stiffness (row 2 of the site block) is the text "8 MPa"; write the number alone, and its unit in the unit column.'],
  ["truth value", put(SMALL, "Mean stiffness", true), "Mean stiffness (row 2 of the site block) is TRUE; a number in MPa is needed."],
  ["error", put(SMALL, "Mean stiffness", "#DIV/0!"), "Mean stiffness (row 2 of the site block) is the error #DIV/0!; a number in MPa is needed."],
  ["error as an object", put(SMALL, "Mean stiffness", { type: "Error", basicValue: "#N/A" }), "Mean stiffness (row 2 of the site block) is the error #N/A; a number in MPa is needed."],
  ["something else", put(SMALL, "Mean stiffness", { type: "Entity" }), "Mean stiffness (row 2 of the site block) is the error #VALUE!; a number in MPa is needed."],
  ["not a number", put(SMALL, "Mean stiffness", NaN), "Mean stiffness (row 2 of the site block) is the error #NUM!; a number in MPa is needed."],
  ["infinite", put(SMALL, "Mean stiffness", Infinity), "Mean stiffness (row 2 of the site block) is the error #NUM!; a number in MPa is needed."],
  ["negative COV", put(SMALL, "Stiffness COV", -0.3), "Stiffness COV (row 3 of the site block) is -0.3; it must be from 0.01 to 3 (common practice 0.1 to 1)."],
  ["COV that is a percentage", put(SMALL, "Stiffness COV", 60), "Stiffness COV (row 3 of the site block) is 60; it must be from 0.01 to 3 (common practice 0.1 to 1). If it is meant in %, write % in the unit column."],
  ["COV above three", put(SMALL, "Stiffness COV", 1000), "Stiffness COV (row 3 of the site block) is 1000; it must be from 0.01 to 3 (common practice 0.1 to 1)."],
  ["ratio with a percent sign", put(SMALL, "Stiffness COV", 0.6, "%"), "Stiffness COV (row 3 of the site block) is 0.6 %; if its cell shows 60 %, leave the unit cell blank, because the sheet stores 0.6."],
  ["diameter in mm", put(SMALL, "Pile diameter", 600), "Pile diameter (row 16 of the site block) is 600 m; it must be from 0.1 m to 4 m. If it is meant in mm, write mm in the unit column."],
  ["negative price", put(SMALL, "Price per metre of pile", -5), "Price per metre of pile (row 24 of the site block) is -5 EUR/m; a price above zero is needed, or the word none if it costs nothing."],
  ["price beyond counting", put(SMALL, "Price per hole", 1e15), "Price per hole (row 22 of the site block) is 1000000000000000 EUR; it must be from 0.01 to 1000000000000."],
  ["half a pile", put(SMALL, "Piles along x", 2.5), "Piles along x (row 8 of the site block) is 2.5; a whole number from 1 to 100 is needed."],
  ["footprint of zero", add(SMALL, ["Footprint length", 0, "m"]), "Footprint length (row 25 of the site block) is blank or zero; write a number, or take the row out for the default (outline of the piles along x and one pile spacing)."],
  ["footprint too small", add(SMALL, ["Footprint width", 0.5, "m"]), "Footprint width (row 25 of the site block) is 0.5 m; it must be from 1 m to 10000 m."],
];

const TEXTS_THAT_LOOK_LIKE_NUMBERS: readonly Refusal[] = ["8", "8,5", " 8.5 ", "1 000", "1.000,5", "1'000", "-3", "60 %", ".5", "1e3"].map((text) => [
  `number stored as text: ${text}`, put(SMALL, "Mean stiffness", text),
  `Mean stiffness (row 2 of the site block) is "${text.trim()}", a number stored as text; type it again in a cell of number format.`,
]);

const LENGTHS_LISTED = "the unit must be m, mm, cm, ft or in";
const PRESSURES_LISTED = "the unit must be kPa, MPa, GPa, Pa, psf, ksf, psi, ksi or tsf";
const FORCES_LISTED = "the unit must be kN, MN, N, kip, lbf, tonf US, tonf UK or tf";
const UNITS: readonly Refusal[] = [
  ["wrong kind", put(SMALL, "Mean stiffness", 8, "kN"), `Mean stiffness (row 2 of the site block) has the unit "kN", which is a force; a stiffness or pressure is needed, so ${PRESSURES_LISTED}.`],
  ["length for force", put(SMALL, "Interior load", 8, "m"), `Interior load (row 12 of the site block) has the unit "m", which is a length; a force is needed, so ${FORCES_LISTED}.`],
  ["unknown unit", put(SMALL, "Hole depth", 15, "fathom"), `Hole depth (row 20 of the site block) has the unit "fathom", which is not known; ${LENGTHS_LISTED}.`],
  ["which ton", put(SMALL, "Interior load", 100, "ton"), 'Interior load (row 12 of the site block) has the unit "ton"; say which ton: tonf US (2,000 lbf), tonf UK (2,240 lbf) or tf (1,000 kgf).'],
  ["number for a unit", put(SMALL, "Hole depth", 15, 3), `Hole depth (row 20 of the site block) has 3 in its unit cell; ${LENGTHS_LISTED}.`],
  ["error for a unit", put(SMALL, "Hole depth", 15, "#NAME?"), "Hole depth (row 20 of the site block) has the error #NAME? in its unit cell."],
  ["unit of a COV", put(SMALL, "Stiffness COV", 0.6, "MPa"), 'Stiffness COV (row 3 of the site block) has the unit "MPa", which is a stiffness or pressure; a ratio is needed, so the unit must be ratio or %.'],
  ["unit of a plain number", put(SMALL, "Piles along x", 2, "m"), 'Piles along x (row 8 of the site block) has the unit "m", which is a length; it is a plain number without a unit.'],
  ["weeks", add(SMALL, ["Days per hole", 2, "weeks"]), 'Days per hole (row 25 of the site block) has the unit "weeks", which is not known; the unit must be days.'],
  ["money in metres", put(SMALL, "Building value", 8, "m"), 'Building value (row 13 of the site block) has the unit "m", which is a length; the unit must be money, such as EUR.'],
  ["money in thousands", put(SMALL, "Building value", 8, "1000 EUR"), 'Building value (row 13 of the site block) has the unit "1000 EUR"; the unit must be money, such as EUR.'],
  ["price of a hole per metre", put(SMALL, "Price per hole", 8, "EUR/m"), 'Price per hole (row 22 of the site block) has the unit "EUR/m"; the unit must be money, such as EUR or EUR/hole.'],
  ["day price per week", add(SMALL, ["Price of a delay day", 8, "EUR/week"]), 'Price of a delay day (row 25 of the site block) has the unit "EUR/week"; the unit must be money, such as EUR or EUR/day.'],
  ["price per mm", put(SMALL, "Price per metre of pile", 8, "EUR/mm"), 'Price per metre of pile (row 24 of the site block) has the unit "EUR/mm"; the unit must be money per m or per ft, such as EUR/m.'],
  ["two currencies", put(SMALL, "Price per hole", 8, "USD"), "Price per hole (row 22 of the site block) is in USD, but Building value (row 13 of the site block) is in EUR; all prices must be in the same money."],
  ["thousands beside units", put(SMALL, "Building value", 2000, "kEUR"), "Price per hole (row 22 of the site block) is in EUR, but Building value (row 13 of the site block) is in kEUR; all prices must be in the same money."],
];

const COUNTS = "write the largest number of holes (12), from and to (0 to 12) or all numbers (0, 1, 2, 4, 8), none above 60";
const WORDS: readonly Refusal[] = [
  ["choice", add(SMALL, ["Correlation", "gausian"]), 'Correlation (row 25 of the site block) is "gausian"; is Gaussian meant? Accepted: separable Markov, ellipsoidal Markov, Gaussian, spherical or second-order Markov.'],
  ["choice, nothing near", add(SMALL, ["Length rule", "zzzzzz"]), 'Length rule (row 25 of the site block) is "zzzzzz"; accepted: one for all, one per load or nearest hole.'],
  ["choice as a number", add(SMALL, ["Length rule", 3]), "Length rule (row 25 of the site block) is 3; accepted: one for all, one per load or nearest hole."],
  ["choice as an error", add(SMALL, ["Length rule", "#N/A"]), 'Length rule (row 25 of the site block) is "#N/A"; accepted: one for all, one per load or nearest hole.'],
  ["blank choice", add(SMALL, ["Length rule", ""]), "Length rule (row 25 of the site block) is blank or zero; accepted: one for all, one per load or nearest hole; or take the row out for the default (one per load)."],
  ["neither on nor off", add(SMALL, ["Group interaction", "perhaps"]), 'Group interaction (row 25 of the site block) is "perhaps"; accepted: off or on.'],
  ["blank instead of off", add(SMALL, ["Group interaction", 0]), "Group interaction (row 25 of the site block) is blank or zero; accepted: off or on; or take the row out for the default (off)."],
  ["blank seed", add(SMALL, ["Seed", 0]), "Seed (row 25 of the site block) is blank or zero; write a number or a word, or take the row out for the default (1)."],
  ["truth value as a seed", add(SMALL, ["Seed", false]), "Seed (row 25 of the site block) is FALSE; a number or a word is needed."],
  ["error as a seed", add(SMALL, ["Seed", "#N/A"]), 'Seed (row 25 of the site block) is "#N/A"; a number or a word is needed.'],
  ["long seed", add(SMALL, ["Seed", "s".repeat(41)]), `Seed (row 25 of the site block) is "${"s".repeat(38)}...", of 41 letters; at most 40 are accepted.`],
  ["blank counts", add(SMALL, ["Counts", 0]), `Counts (row 25 of the site block) is blank or zero; ${COUNTS}.`],
  ["half a count", add(SMALL, ["Counts", 2.5]), `Counts (row 25 of the site block) is 2.5; ${COUNTS}.`],
  ["too many counts", add(SMALL, ["Counts", 61]), `Counts (row 25 of the site block) is 61; ${COUNTS}.`],
  ["counts as text", add(SMALL, ["Counts", "12"]), `Counts (row 25 of the site block) is "12", a number stored as text; ${COUNTS}.`],
  ["counts as a date", add(SMALL, ["Counts", 46000]), `Counts (row 25 of the site block) is 46000; the sheet may have made a date of what was typed; ${COUNTS}.`],
  ["counts backwards", add(SMALL, ["Counts", "12 to 3"]), `Counts (row 25 of the site block) is "12 to 3"; ${COUNTS}.`],
  ["counts beyond", add(SMALL, ["Counts", "0 to 99"]), `Counts (row 25 of the site block) is "0 to 99"; ${COUNTS}.`],
  ["counts in words", add(SMALL, ["Counts", "a few"]), `Counts (row 25 of the site block) is "a few"; ${COUNTS}.`],
  ["counts beyond the hole list", add(SMALL, ["Counts", "0 to 5"], ["Hole list"], [1, 2], [3, 4]), "Counts (row 25 of the site block) is 0 to 5, but Hole list (row 26 of the site block) holds 2 holes; add rows to the list or lower the counts."],
];

const PILES: readonly Refusal[] = [
  ["two piles in one place", piles([0, 0, 900], [5, 0, 900], [0, 0, 800]), "Piles 1 and 3 of the pile list (rows 21 and 23 of the site block) stand in one place; give each pile its own."],
  ["two piles in each other", piles([0, 0, 900], [0.3, 0, 900]), "Piles 1 and 2 of the pile list (rows 21 and 22 of the site block) stand 0.3 m apart, less than Pile diameter (row 11 of the site block) of 0.5 m; move them apart or make them thinner."],
  ["grid too tight", put(SMALL, "Spacing along x", 0.4), "Piles 1 and 2 of the grid stand 0.4 m apart, less than Pile diameter (row 16 of the site block) of 0.5 m; move them apart or make them thinner."],
  ["a single pile", piles([0, 0, 900]), "Pile list (row 20 of the site block) has a single pile: it has no neighbour, so no angular distortion and no cost of failure can be computed; give at least two piles of the foundation."],
  ["a grid of one", put(put(SMALL, "Piles along x", 1), "Piles along y", 1), "Piles along x (row 8 of the site block) and Piles along y (row 9 of the site block) give a single pile: it has no neighbour, so no angular distortion and no cost of failure can be computed; give at least two piles of the foundation."],
  ["too many in a grid", put(put(SMALL, "Piles along x", 100), "Piles along y", 100), "Piles along x (row 8 of the site block) and Piles along y (row 9 of the site block) give 10000 piles; at most 100 are priced at once, so give a typical part of the foundation."],
  ["too many in a list", piles(...Array.from({ length: 101 }, (_, k) => [k, 0, 900])), "Pile list (row 20 of the site block) has 101 rows; at most 100 are accepted."],
  ["grid and list", list("Pile list", [0, 0, 900], [5, 0, 900]), "Piles along x (row 8 of the site block) and Pile list (row 25 of the site block) are both given; the list takes the other's place, so take one of them out."],
  ["no load", piles([0, 0, 900], [5, 0, 0]), "Pile list, Load (row 22 of the site block) is blank or zero; write a number."],
  ["no load cell", piles(["x", "y", "Load"], [0, 0, 900], [5, 0, ""]), "Pile list, Load (row 23 of the site block) is blank; write a number."],
  ["load as text", piles([0, 0, 900], [5, 0, "900"]), 'Pile list, Load (row 22 of the site block) is "900", a number stored as text; type it again in a cell of number format.'],
  ["place as text", piles([0, 0, 900], ["5", 0, 900]), 'Pile list, x (row 22 of the site block) is "5", a number stored as text; type it again in a cell of number format.'],
  ["error in a row", piles([0, 0, 900], ["#REF!", 0, 900]), "Pile list, x (row 22 of the site block) is the error #REF!; a number in m is needed."],
  ["blank row among the rows", piles([0, 0, 900], [""], [5, 0, 900]), "Pile list (row 22 of the site block) has a row that is blank or all zeros among its rows; take it out or fill it in. If it stands for (0, 0), write its name in a first column headed Pile."],
  ["no rows", add(withoutGrid(SMALL), ["Pile list"]), "Pile list (row 20 of the site block) has no rows directly below it; write them there, or the word automatic beside the label for the grid."],
  ["a value beside the label", add(withoutGrid(SMALL), ["Pile list", 12], [0, 0, 900], [5, 0, 900]), "Pile list (row 20 of the site block) has 12 beside it; its rows stand below the label, or the word automatic beside it."],
  ["automatic and rows", list("Hole list", [1, 2]).map((row) => (row[0] === "Hole list" ? ["Hole list", "automatic", "", ""] : row)), "Hole list (row 25 of the site block) has the word automatic beside it, but 1 row below it; take out one or the other."],
  ["misspelt column", piles(["x", "y", "Laod"], [0, 0, 900], [5, 0, 900]), "Pile list (row 21 of the site block) has no column headed Load; its columns are Pile (may be left out), x, y and Load."],
  ["column twice", piles(["x", "y", "x", "Load"], [0, 0, 0, 900], [5, 0, 5, 900]), "Pile list (row 21 of the site block) has two columns headed x."],
  ["unit of a column", piles(["x", "y", "Load, MPa"], [0, 0, 900], [5, 0, 900]), `Pile list, Load (row 21 of the site block) has the unit "MPa", which is a stiffness or pressure; a force is needed, so ${FORCES_LISTED}.`],
  ["longest below shortest", put(SMALL, "Longest length", 2.5), "Longest length (row 18 of the site block) is 2.5 m, less than Shortest length (row 17 of the site block) of 3 m."],
  ["longest like shortest", put(SMALL, "Longest length", 3), "Longest length (row 18 of the site block) is 3 m and Shortest length (row 17 of the site block) is 3 m; the longest must be at least a tenth longer, or there is no length to choose."],
  ["shorter than a pile", put(SMALL, "Pile diameter", 2), "Shortest length (row 17 of the site block) is 3 m, less than twice Pile diameter (row 16 of the site block) of 2 m: that is a footing, not a pile."],
  ["step too long", add(put(SMALL, "Longest length", 5), ["Length step", 3, "m"]), "Length step (row 25 of the site block) is 3 m, more than the 2 m between the shortest and the longest length."],
];

const GROUND: readonly Refusal[] = [
  ["mean and layers", list("Layer list", [0, 8, 0, 0.4]), "Mean stiffness (row 2 of the site block) and Layer list (row 25 of the site block) are both given; the list takes the other's place, so take one of them out."],
  ["first layer deeper than 0", layers([1, 8, 0, 0.4]), "Layer list, Top (row 24 of the site block) is 1 m; the first layer begins at 0."],
  ["layers upwards", layers([0, 8, 0, 0.4], [5, 8, 0, 0.4], [5, 9, 0, 0.4]), "Layer list, Top (row 26 of the site block) is 5 m, no deeper than the layer above; layers are listed downwards."],
  ["layer without COV", layers([0, 8, 0, 0.4], [5, 8]), 'Layer list, COV (row 25 of the site block) is blank or zero; write a COV there, or a row "Stiffness COV" for all layers that have none of their own.'],
  ["layer without mean", layers([0, 8, 0, 0.4], [5, 0, 0, 0.4]), "Layer list, Mean (row 25 of the site block) is blank or zero; write a number."],
  ["absurd COV of a layer", layers([0, 8, 0, 40]), "Layer list, COV (row 24 of the site block) is 40; it must be from 0.01 to 3. If it is meant in %, write % in the unit column."],
];

const DAMAGE: readonly Refusal[] = [
  ["distortions that fall", list("Damage list", ["1/300", 0], ["1/500", 0.1]), "Damage list, Distortion (row 27 of the site block) is 1/500, no larger than 1/300 in row 26 of the site block; distortions grow from row to row."],
  ["shares that fall", list("Damage list", ["1/500", 0], ["1/300", 0.4], ["1/150", 0.3]), "Damage list, Share (row 28 of the site block) is 0.3, less than 0.4 in row 27 of the site block; shares grow from row to row."],
  ["first share not 0", list("Damage list", ["1/500", 0.1], ["1/300", 0.4]), "Damage list, Share (row 26 of the site block) is 0.1; the first row says where damage begins, so its share is 0."],
  ["one row", list("Damage list", ["1/500", 0]), "Damage list (row 25 of the site block) has one row; at least two are needed: where damage begins (share 0), and a larger distortion with its share."],
  ["share above 1", list("Damage list", ["1/500", 0], ["1/300", 10]), "Damage list, Share (row 27 of the site block) is 10; it must be from 0 to 1. If it is meant in %, write % in the unit column."],
  ["distortion as its inverse", list("Damage list", [500, 0], [300, 0.1]), "Damage list, Distortion (row 26 of the site block) is 500; if 1/500 is meant, write it so; distortions from 1/100000 to 1/10 are accepted."],
  ["distortion made a date", list("Damage list", [46052, 0], [300, 0.1]), "Damage list, Distortion (row 26 of the site block) is 46052; the sheet may have made a date of a fraction, so type it as =1/30; distortions from 1/100000 to 1/10 are accepted."],
  ["distortion as text", list("Damage list", ["0.002", 0], ["1/300", 0.1]), 'Damage list, Distortion (row 26 of the site block) is "0.002", a number stored as text; write it as 1/500 or 0.002.'],
  ["fraction out of range", list("Damage list", ["1/2", 0], ["1/300", 0.1]), 'Damage list, Distortion (row 26 of the site block) is "1/2"; distortions from 1/100000 to 1/10 are accepted.'],
  ["fraction of nothing", list("Damage list", ["1/0", 0], ["1/300", 0.1]), 'Damage list, Distortion (row 26 of the site block) is "1/0"; distortions from 1/100000 to 1/10 are accepted.'],
  ["zero among the rows", list("Damage list", ["1/500", 0], [0, 0.1]), "Damage list, Distortion (row 27 of the site block) is blank or zero; write it as 1/500 or 0.002."],
];

const HOLES: readonly Refusal[] = [
  ["two holes in one place", list("Hole list", [1, 2], [3, 4], [1, 2]), "Holes 1 and 3 of the hole list (rows 26 and 28 of the site block) stand in one place; give each hole its own."],
  ["hole far away", list("Hole list", [1, 2], [500000, 200000]), "Hole 2 of the hole list (row 27 of the site block) stands 538513 m from the middle of the piles; holes and piles need the same coordinates."],
  ["too many holes", list("Hole list", ...Array.from({ length: 61 }, (_, k) => [k, 1])), "Hole list (row 25 of the site block) has 61 rows; at most 60 are accepted."],
  ["one reading for a rule of deviations", add(put(SMALL, "Hole depth", 3.5), ["Reading spacing", 2, "m"], ["Design rule", "mean less deviations"]), "Hole depth (row 20 of the site block) is 3.5 m, which gives a hole one reading at Reading spacing (row 25 of the site block) of 2 m; the design rule mean less deviations needs at least two, so read more closely or drill deeper."],
  ["hole shallower than its spacing", add(put(SMALL, "Hole depth", 1), ["Reading spacing", 2, "m"]), "Hole depth (row 20 of the site block) is 1 m, less than Reading spacing (row 25 of the site block) of 2 m: no hole would have a reading."],
  ["readings too near", add(put(SMALL, "Hole depth", 30), ["Reading spacing", 5, "cm"]), "Reading spacing (row 25 of the site block) is 0.05 m, which makes 600 readings in a hole of 30 m; at most 400 are used, so average nearer readings and write the distance of the averages."],
];

describe.each([
  ["the shape of the range", SHAPES], ["labels", LABELS], ["missing inputs", MISSING], ["numbers", NUMBERS], ["numbers stored as text", TEXTS_THAT_LOOK_LIKE_NUMBERS],
  ["units", UNITS], ["words", WORDS], ["piles", PILES], ["ground", GROUND], ["damage", DAMAGE], ["holes", HOLES],
] as const)("%s", (_, refusals) => {
  it.each(refusals.map(([what, rows, sentence]) => [what, sentence, rows] as const))("%s: %s", (_what, sentence, rows) => {
    expect(refusalOf(rows)).toBe(sentence);
  });
});

describe("rows of zeros in a hole list", () => {
  // on machines that hand blank cells over as 0 a hole at (0, 0) and a blank row are the same cells
  const zeros = (rows: readonly Row[]) => rows.map((row) => row.map((cell) => (cell === "" ? 0 : cell)));

  it("are refused among the holes, with the way out", () => {
    const sentence = "Hole list (row 27 of the site block) has a row that is blank or all zeros among its rows; take it out or fill it in. If it stands for (0, 0), write its name in a first column headed Hole.";
    expect(refusalOf(zeros(list("Hole list", [5, 5], [0, 0], [1, 1])))).toBe(sentence);
    expect(refusalOf(zeros(list("Hole list", [0, 0], [5, 5])))).toBe(sentence.replace("row 27", "row 26"));
  });
});

/** As much as a cell holds. */
const MUCH_TEXT = ["x ", "yy", "z "].map((piece) => Array.from({ length: 16_000 }, () => piece).join(""));

describe("large ranges", () => {
  it.each<[string, unknown]>([
    ["a whole column", column(1_048_576)],
    ["whole columns", Array.from({ length: 1_048_576 }, () => [0, 0, 0, 0])],
    ["ten thousand rows", Array.from({ length: 10_000 }, (_, k) => [`Label ${k}`, k, "m", ""])],
    ["a thousand unknown labels", Array.from({ length: 1000 }, (_, k) => [`Unknown label number ${k} of a long list`, k, "m", ""])],
    ["a thousand wrong rows of a list", add(SMALL, ["Hole list"], ...Array.from({ length: 900 }, () => ["#N/A", "x"]))],
    ["a thousand cells of much text", Array.from({ length: 1000 }, () => MUCH_TEXT)],
  ])("%s is answered within a second", (_, rows) => {
    const start = performance.now();
    expect(() => parseSite(rows as Row[])).toThrow(InputError);
    const check = checkSite(rows as Row[]);
    expect(performance.now() - start).toBeLessThan(1000);
    expect(check.some(({ ok }) => !ok)).toBe(true);
    expect(check.length).toBeLessThan(150);
  });
});

describe("an InputError", () => {
  it("names the row and the input besides its sentence", () => {
    let error: unknown;
    try {
      parseSite(put(SMALL, "Stiffness COV", -1));
    } catch (caught) {
      error = caught;
    }
    expect(error).toMatchObject({ name: "InputError", row: 3, id: "stiffnessCov" });
  });

  it("is that of the first row from the top, and of missing inputs last", () => {
    expect(refusalOf(put(put(without(SMALL, "Mean stiffness"), "Hole depth", "deep"), "Stiffness COV", "wide"))).toMatch(/^Stiffness COV \(row 2 /);
    expect(refusalOf(put(without(SMALL, "Mean stiffness"), "Hole depth", "deep"))).toMatch(/^Hole depth \(row 19 /);
  });
});
