/**
 * The words of every problem in the sheets: what it means and what to do. The cell is named beside the message, so the
 * words do not repeat it. What finds a problem is in lib/intake (and, for mechanisms, lib/analysis).
 */
import { quantityWords, type Quantity } from '@/lib/units/quantity';

const list = (words: readonly string[], joint = 'or'): string =>
  words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} ${joint} ${words.at(-1) ?? ''}`;
const hint = (suggestion: string | null): string => (suggestion === null ? '' : ` Did you mean ${suggestion}?`);
const figure = (value: number): string => String(Number(value.toPrecision(4)));

// --- sheets and headings

export const missingSheet = (name: string, empty: boolean): string =>
  empty
    ? `sheet ${name} is empty. Fill it, or describe the frames in Variants`
    : `sheet ${name} is missing. Add it, or describe the frames in Variants`;
// --- changes

export const memberAndRole = (): string => 'a row names a member or a role, not both. Keep one';
export const memberOrRole = (): string => 'say which members: a member of a frame, or a role';
export const memberNeedsFrame = (member: string): string => `member ${member} needs its frame: name it`;
export const frameNotRun = (frame: string): string => `${frame} is no frame of this revision that can run`;
export const noSuchMember = (member: string, frame: string): string => `frame ${frame} has no member ${member}`;
export const noSuchRole = (role: string, frame: string | null): string =>
  frame === null ? `no frame has a member with the role ${role}` : `frame ${frame} has no member with the role ${role}`;
export const changedTwice = (to: string, row: number): string =>
  `row ${row} gives the same member ${to}. Keep one, or name the frame and the member`;

export const tableMissing = (name: string): string =>
  `no sheet ${name} is in these files. Name the sheet so, or send one sheet alone`;
export const sheetIgnored = (name: string): string => `sheet “${name}” is none that is read, so it is left alone`;
export const nearMissSheet = (name: string, near: string): string =>
  `sheet “${name}” is not read. If it is meant as ${near}, name it so`;
export const noHeadings = (definition: { name: string; required: readonly (readonly string[])[] }): string =>
  `none of the top 20 rows holds the headings of ${definition.name}: ${list(definition.required.map((each) => each.join(' or ')), 'and')}`; // prettier-ignore
export const missingColumn = (names: readonly string[], sheet: string): string =>
  `${sheet} needs a column headed ${list(names)}. Add it, or name the column so`;
export const columnTwice = (known: string, first: string): string =>
  `two columns are headed ${known} (the other is “${first}”). Keep one`;
export const columnUnheaded = (letters: string): string => `column ${letters} has no heading, so what stands in it is not read`;
export const columnIgnored = (text: string, sheet: string): string =>
  `“${text}” is no column of ${sheet}, so what stands below it is not read`;
export const nearMissColumn = (text: string, near: string): string =>
  `“${text}” is not read. If it is meant as ${near}, head it so`;
export const radiusIgnored = (text: string): string => `“${text}” reads as a radius of gyration, which is not needed`;
export const sayMajorOrMinor = (text: string): string =>
  `“${text}” means one axis in metric files and another in US files: say major or minor in its place`;
export const unknownUnit = (unit: string, column: string): string =>
  `“${unit}” (${column}) is no unit that is known. Write it as kN, mm, kN/m, cm4, ksi …`;
export const wrongUnitKind = (unit: string, quantity: Quantity): string => `${unit} is no unit of ${quantityWords[quantity]}`;
export const totalRow = (): string => 'a row of totals is no data. Delete it, or start it with # to have it passed over';

// --- cells

export const missingId = (column: string): string =>
  `${column} is blank. Each row needs its own: a blank cell is not filled from the row above`;
export const numberMissing = (column: string): string => `${column} is blank, and a number is needed`;
export const notANumber = (found: string, column: string, quantity: string): string =>
  `“${found}” (${column}) is not a number. Write ${quantity} as a plain number, like 28.5`;
export const ambiguousComma = (found: string): string =>
  `“${found}” may be ${found.replace(',', '.')} or ${found.replace(/[.,]/, '')}. Write it without a mark for the thousands, or with all its decimals`;
export const textNumber = (found: string): string => `“${found}” is a number stored as text; it is read as the number`;
export const unitInCell = (unit: string): string => `the unit ${unit} in the cell is used in place of the heading's`;
export const dateForNumber = (found: string, column: string): string =>
  `${found} is a date, and ${column} is a number. Spreadsheets turn entries like 1-2 into dates: format the cell as number and type it again`;
export const dateForId = (found: string, iso: string): string =>
  `${found} is a date (${iso}), not a name. Spreadsheets turn entries like 1-2 into dates: format the cell as text and type it again`;
export const errorValue = (found: string): string => `the cell shows ${found}. Mend its formula`;
export const noStoredValue = (formula: string): string =>
  `the formula ${formula} has no stored value. Open the file in a spreadsheet, let it calculate, save it, and send that`;
export const mergedValue = (master: string): string => `merged with ${master}: its value is read here too`;
export const unknownWord = (column: string, found: string, words: readonly string[]): string =>
  found === '' ? `${column} is blank. Write ${list(words)}` : `“${found}” is no ${column}. Write ${list(words)}`;
export const unknownWordOrNumber = (column: string, found: string, words: readonly string[]): string =>
  `“${found}” is no ${column}. Write ${list(words)}, or a spring stiffness as a number`;
export const notPositive = (what: string, found: string): string => `${what} must be above zero; found ${found}`;
export const atMostOne = (what: string, found: string): string => `${what} must be at most 1; found ${found}`;
export const negativeSpring = (found: string): string => `a spring stiffness cannot be negative; found ${found}`;

// --- rows

export const repeatedRow = (row: number): string => `the same as row ${row}; it is read once`;
export const repeatedLoad = (row: number): string =>
  `the same as row ${row}. Loads add, so it acts twice: delete one if that is a slip`;
export const conflictingRow = (key: string, row: number): string =>
  `row ${row} says something else for the same ${key}. Keep the row that is right`;
export const duplicateId = (what: string, id: string, row: number): string =>
  `${what} ${id} stands in row ${row} already, with other content. Keep one, or give this one a name of its own`;
export const unknownFrame = (id: string): string =>
  `frame ${id} is in none of Frames, Variants and Nodes. Add its nodes, or mend the name`;
export const starFitsNone = (): string => 'this row is for all frames, but none has what it names';

// --- setup

export const unknownSetting = (found: string, near: string | null): string =>
  `“${found}” is no setting, so it is not read.${hint(near)}`;
export const settingTwice = (name: string, row: number): string =>
  `${name} is given in row ${row} too, with another value. Keep one`;
export const columnNotSupported = (column: string): string =>
  `${column} is not computed by this version, so the frame is not run. Nothing simpler is run in its place`;

export const firstOrderTaken = (name: string): string =>
  `analysis is not given, so ${name} ${name.endsWith('s') ? 'act' : 'acts'} in a first-order analysis. For second order, add the setting analysis second order`;

// --- frames, families, variants

export const tooManyFrames = (count: number, most: number): string =>
  `the batch holds ${count} frames and may hold ${most}. Split it into several files`;
export const frameIsFamily = (id: string): string =>
  `${id} is the name of a family, and a frame may not have it. Rename the frame`;
export const frameNotListed = (id: string): string => `frame ${id} is not in Frames; it is run all the same`;
export const frameWithoutNodes = (id: string): string =>
  `frame ${id} has no nodes. Add them in Nodes, or take it out of the list`;
export const parameterTwice = (name: string): string => `parameter ${name} stands in this family already. Keep one`;
export const choicesMissing = (name: string): string =>
  `${name} is a choice: list what may be chosen in choices, with commas between`;
export const unknownFamily = (name: string, near: string | null): string =>
  `family ${name} is neither in Families nor built in (portal, bracket).${hint(near)}`;
export const familyWrong = (name: string): string => `the description of family ${name} in Families is wrong; mend it there`;
export const unknownParameter = (column: string, near: string | null, families: readonly string[]): string =>
  `“${column}” is no parameter of ${list(families)}.${hint(near)}`;
export const parameterOfOther = (column: string, family: string): string =>
  `${family} has no parameter ${column}. Clear the cell`;
export const parameterBlank = (name: string): string => `${name} is blank and the family gives no default. Fill it`;
export const parameterColumn = (name: string, family: string): string =>
  `family ${family} needs ${name}, which has no default. Add a column headed ${name}`;
export const parameterRange = (
  name: string,
  range: { readonly min: number | null; readonly max: number | null; readonly open: boolean },
): string => {
  const from = range.min === null ? null : `${range.open ? 'above' : 'at least'} ${figure(range.min)}`;
  const to = range.max === null ? null : `${range.open && from === null ? 'below' : 'at most'} ${figure(range.max)}`;
  return `${name} must be ${[from, to].filter((each) => each !== null).join(' and ')}, in the family's unit`;
};
export const badExpression = (why: string): string => `the expression cannot be used: ${why}`;
export const variantExpression = (expression: string, why: string): string => `with this variant's values, ${expression}: ${why}`;
export const expressionOutsideFamily = (): string =>
  'an expression with parameters belongs in a row of a family. Name the family in the frame column, or write the value';
export const textForNumber = (text: string): string => `the expression gives the text “${text}” where a number is needed`;
export const whenNeedsBraces = (found: string): string => `when holds an expression in braces, like {rise > 0}; found “${found}”`;
export const whenNeedsTruth = (): string => 'when must be a comparison, like {rise > 0}';

// --- nodes and members

export const unknownNode = (node: string, frame: string): string =>
  `node ${node} is not in Nodes for frame ${frame}. Add it there, or mend the name`;
export const unknownMember = (member: string, frame: string): string =>
  `member ${member} is not in Members for frame ${frame}. Add it there, or mend the name`;
export const unknownSection = (name: string, near: string | null): string =>
  `section ${name} is neither in Sections nor a designation of the library.${hint(near)}`;
export const unknownMaterial = (name: string, near: string | null): string =>
  `material ${name} is neither in Materials nor a grade that is held.${hint(near)}`;
export const retired = (name: string): string =>
  `${name} was one of the office’s own and is no longer offered. Name another, or give its figures in the sheets`;
export const isStandard = (held: string): string =>
  `${held} is a standard one. Give the office’s own another name, so that nobody takes the one for the other`;
export const badName = (): string => 'a name has at most 60 characters, and none of { } *';
export const materialMissing = (): string => 'no material is given here, in Sections or in Setup. Give one';
export const turnedNeedsMinor = (section: string): string =>
  `a turned member bends about the section's minor axis: section ${section} needs I minor`;
export const tensionOnlyIsPinned = (): string =>
  'a tension-only member is pinned at both ends. Write pin, or leave the joint blank';
export const tensionOnlyInSpan = (span: string): string =>
  `span ${span} has pieces that are tension only and others that are not, so it is no one physical member`;
export const coincident = (node: string, other: string): string =>
  `nodes ${node} and ${other} are less than 1 mm apart and not joined. If they are one joint, use one node`;
export const zeroLength = (member: string, sameNode: boolean): string =>
  sameNode ? `member ${member} starts and ends at one node` : `member ${member} is less than 1 mm long: its ends are one point`;
export const sameEnds = (member: string, other: string): string => `members ${member} and ${other} join the same two nodes`;
export const crossing = (member: string, other: string): string =>
  `members ${member} and ${other} cross or touch without a node, so they are not joined there. If they should be, add a node`;
export const spanBent = (span: string, member: string, lead: string): string =>
  `span ${span}: ${member} is not in line with ${lead} within 0.5°, so they are not one physical member`;
export const spanApart = (span: string, member: string): string =>
  `span ${span}: ${member} does not follow on from its other pieces end to end`;
export const spanLengths = (span: string, column: string, lead: string): string =>
  `span ${span}: ${column} differs from that of ${lead}. The pieces of one physical member have the same`;
export const suspectCoordinate = (): string => 'over 500 m from the origin: is the coordinate in the unit of its heading?';

// --- sections and materials

export const sectionTwoWays = (ways: readonly string[]): string =>
  `the section is given by ${list(ways, 'and')}. Keep one, so that it is plain which holds`;
export const shapeMissing = (shapes: readonly string[]): string => `dimensions need a shape: ${list(shapes)}`;
export const unknownDesignation = (name: string, near: string | null): string =>
  `${name} is no designation of the library, and neither shape nor properties are given.${hint(near)}`;
export const designationTaken = (note: string): string => `taken as ${note}`;
export const dimensionMissing = (shape: string, dimension: string): string => `shape ${shape} needs ${dimension}`;
export const publishedFar = (name: string, share: number): string =>
  `${name} is ${figure(Math.abs(share) * 100)} % ${share > 0 ? 'above' : 'below'} what the dimensions give. Is it in its unit, and of this section?`;
export const yieldSteps = (found: string): string =>
  `“${found}” is no yield strength by thickness. Write it like “355 MPa to 16 mm; 345 MPa to 40 mm”, thinnest first`;
export const yieldTwice = (): string => 'fy and fy by thickness are both given. Keep one, so that it is plain which holds';
export const dimensionUnused = (dimension: string): string => `${dimension} is not used for a section given this way`;
export const impossibleShape = (why: string): string => `these dimensions make no section: ${why}`;
export const propertyMissing = (name: string): string => `a section given by its properties needs ${name}`;
export const symmetricModulus = (): string => 'W is taken from I and depth: the section is taken as symmetric';
export const suspectProportion = (ratio: number): string =>
  `h is ${figure(ratio)} times b, which is odd for an I. Are both in the unit of their headings?`;
export const inertiaTooLarge = (): string =>
  'I is above A·h²/4, which no section of this depth can have. Are A, I and depth in their units?';
export const inertiaSmall = (): string => 'I is below A·h²/30, which is odd for this depth. Are A, I and depth in their units?';
export const unknownGrade = (name: string, near: string | null): string =>
  `grade ${name} is not held.${hint(near)} Without a grade, give E, fy and density`;
export const gradeOrE = (): string => 'a material needs a grade or E';
export const suspectE = (): string => 'E is outside 50 to 250 GPa. Is it in the unit of its heading?';
export const suspectG = (): string => 'G is outside 15 to 100 GPa. Is it in the unit of its heading?';
export const suspectDensity = (): string => 'density is outside 2,000 to 9,000 kg/m³. Is it in the unit of its heading?';
export const suspectYield = (): string => 'fy is above 1,000 MPa. Is it in the unit of its heading?';
export const densityMissing = (material: string, loadCase: string): string =>
  `case ${loadCase} has self-weight, so material ${material} needs a density`;

export const shearAreaMissing = (section: string, turned: boolean): string =>
  `shear deformation needs the shear area of section ${section}${turned ? ', which is turned' : ''}: give Av`;
export const shearModulusMissing = (material: string): string =>
  `shear deformation needs G of material ${material}. Give it, or a grade`;
export const reductionNeedsYield = (material: string): string =>
  `the stiffness reduction of AISC 360 (τb) needs fy of material ${material}`;
export const reductionNeedsThickness = (section: string, grade: string): string =>
  `the stiffness reduction of AISC 360 (τb) needs fy, and that of ${grade} depends on the thickness: give t of section ${section}, or fy`;

// --- supports

export const supportKind = (found: string): string =>
  `“${found}” names a kind of support. Say for each direction whether it is fixed or free: a pin is ux fixed, uy fixed, rz free`;
export const zerosAndOnes = (): string =>
  'the numbers of this sheet are all 0 or 1. A number is a spring stiffness here: write fixed or free';
export const noSupports = (frame: string): string => `frame ${frame} has no supports. Hold it in Supports`;
export const noMembers = (frame: string): string => `frame ${frame} has no members. Add them in Members`;
export const looseNode = (node: string): string =>
  `the part of the frame with node ${node} is joined neither to the rest nor to a support`;
export const nodeWithoutMember = (node: string): string => `no member reaches node ${node}. Join it, or delete the row`;

// --- loads

export const casesAsUsed = (names: readonly string[]): string =>
  `there is no sheet Load cases: the cases ${list(names, 'and')} are taken from the load sheets, all of kind other and without self-weight`;
export const unknownCase = (name: string, known: readonly string[]): string =>
  `${name} is not in Load cases${known.length > 0 && known.length < 13 ? ` (there are ${list(known, 'and')})` : ''}. Add it there, or mend the name`;
export const caseNotHere = (name: string, frame: string): string => `case ${name} does not apply to frame ${frame} by Load cases`;
export const momentOnPins = (node: string): string =>
  `every member end at node ${node} is pinned, so nothing there can take a moment. Join a member rigidly, or move the moment`;
export const mustBeBlank = (column: string, load: string): string =>
  `${column} has no meaning for a ${load} load. Clear the cell`;
export const loadsNothing = (): string => 'no force or moment stands in this row, so it loads nothing';
export const loadOnTensionOnly = (): string =>
  'loads between the ends of a tension-only member are not computed: once slack it cannot carry them. Put the load on its nodes';
export const projectedIsDistributed = (): string => 'projected is for distributed loads. Write global or local';
export const pointNeedsFrom = (load: string): string => `a ${load} load needs from: its distance from the member's start`;
export const fromAfterTo = (equal: boolean): string =>
  equal ? 'from and to are the same, so the load has no length' : 'from is beyond to. Swap them, or mend one';
export const clipped = (before: boolean): string =>
  `a little ${before ? "before the member's start" : "beyond the member's end"}: taken at the end`;
export const beyondEnd = (L: number, before: boolean): string =>
  before ? "before the member's start. Distances are from its start" : `beyond the member's end: it is ${figure(L)} m long`;
export const widthMissing = (): string => "an area load needs width, or the frame's spacing in Frames";
export const gradientNeedsDepth = (section: string): string =>
  `dT across needs the depth of section ${section} in the plane of the frame`;
export const temperatureNeedsExpansion = (material: string): string =>
  `a temperature change needs the expansion of material ${material}`;
export const settlementTwice = (row: number): string =>
  `row ${row} gives a settlement of this node in this case too. Settlements do not add: keep one`;
export const settlementNotFixed = (column: string, node: string): string =>
  `node ${node} is not fixed in this direction, so ${column} cannot be prescribed. Write fixed in Supports, or clear the cell`;

// --- combinations and limits

export const bothForms = (): string => 'a sheet has either the columns case and factor or a column for each case, not both';
export const headingIsNoCase = (heading: string, near: string | null): string =>
  `“${heading}” is no load case. The combinations with a factor below it are left out, and every frame is at best not checked.${hint(near)}`;
export const termWithoutCase = (name: string, near: string | null): string =>
  `${name} is no load case, so this combination is left out, and every frame is at best not checked.${hint(near)}`;
export const combinationLeftOut = (combination: string, name: string): string =>
  `combination ${combination} is left out: ${name} is no load case`;
export const caseCountsZero = (name: string): string =>
  `case ${name} does not apply to every frame; where it does not, it counts 0`;
export const purposesDiffer = (combination: string, row: number): string =>
  `row ${row} gives combination ${combination} another purpose. Its rows must agree`;
export const termTwice = (name: string): string =>
  `this combination gives ${name === '' ? 'its cases' : name} a factor already. Keep one`;
export const tooManySigns = (most: number): string => `more than ${most} terms with ±. List the patterns that matter`;
export const combinationNameTaken = (name: string): string =>
  `the signs of ± give a combination ${name}, and one is listed by that name`;
export const directionNameTaken = (name: string): string =>
  `with imperfections, ${name} is the name of a direction of the strength combination before the arrow. Name this one otherwise`;
export const tooManyCombinations = (set: string, count: number): string =>
  `${set} would make ${count.toLocaleString('en-GB')} combinations of one frame’s cases, and 1,000 are the most. Give cases that never act together the same word in alternative, write “, kinds together” after the set’s name where all cases of a kind act at once, or list combinations`;
export const setTakes = (set: string, words: readonly string[]): string => `${set}: ${words.join('; ')}`;
export const listedInstead = (name: string): string =>
  `the set makes a combination ${name} too; this listed one stands in its place`;
export const noRuleForKind = (name: string, kind: string, set: string): string =>
  `case ${name} is in no generated combination: ${set} has no rule for kind ${kind}`;
export const setOfAnotherLevel = (set: string, check: string, needs: 'allowable' | 'factored'): string =>
  needs === 'factored'
    ? `${set} combines unfactored loads, and ${check} checks resistance against factored ones. Take a set of factored loads`
    : `${set} combines factored loads, and ${check} checks against allowable strength: safety is counted twice`;
export const noSelfWeight = (all: boolean): string =>
  all ? 'no load case carries self-weight. Give it in self weight, usually 1 in the dead case' : 'no load case of these frames carries self-weight'; // prettier-ignore
export const twoSelfWeights = (combination: string, cases: readonly string[]): string =>
  `${combination} holds ${list(cases, 'and')}, and each carries self-weight: it counts more than once`;
export const stressFactorLow = (f: number, combination: string, largest: number): string =>
  `stress factor ${figure(f)} is that of unfactored loads, but ${combination} holds a factor of ${figure(largest)}: is safety counted twice?`;
export const stressFactorHigh = (f: number, combination: string): string =>
  `stress factor ${figure(f)} is that of factored loads, but all factors of ${combination} are 1 or less: is safety left out?`;
export const limitFitsNothing = (name: string, what: 'to node' | 'nodes' | 'members'): string => {
  const names = { 'to node': 'node', nodes: 'node, place, group or role', members: 'member, span, group or role' };
  return `“${name}” is no ${names[what]} of these frames`;
};
export const spreadOfOneNode = (): string => 'spread is between two nodes, and these are one';
export const limitNeedsFigure = (measure: string): string =>
  measure === 'displacement' ? 'a limit on displacement needs absolute' : 'a limit needs ratio or absolute';
export const displacementIsAbsolute = (): string =>
  'a displacement is limited by absolute only: there is no length to divide by ratio';
export const spreadNeedsNode = (): string => 'spread is the change of distance between two nodes: give the other one in to node';
export const unknownCombination = (name: string): string => `combination ${name} is not in Combinations`;
export const limitOnStrength = (name: string): string =>
  `limits on movement are for service combinations, and ${name} is for strength`;
export const repeatedLimit = (where: string): string => `${where} says the same`;
export const limitsDiffer = (where: string): string => `${where} limits the same thing by another figure. Keep one`;
