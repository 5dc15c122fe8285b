import { metres } from "../../units/quantities.js";
import { fieldCorrelation } from "../ground/field-correlation.js";
import { separableTerms } from "../ground/separable-terms.js";
import { designDistribution, type LogVariances } from "../investigation/design-distribution.js";
import { automaticHoles, type Point } from "../investigation/hole-positions.js";
import { readingDepths } from "../investigation/reading-depths.js";
import { readingSums, type ReadingSums } from "../investigation/reading-sums.js";
import { requireDomain } from "../numerics/domain-error.js";
import { hypotenuse } from "../numerics/hypotenuse.js";
import { logarithmOfOnePlus } from "../numerics/logarithm.js";
import { groundProfile } from "./ground-profile.js";
import { commonLaw, nearestLaw, type DesignLaw } from "./design-law.js";
import { layoutTables, type LayoutTables } from "./layout.js";
import { pileFamily, type PileFamily } from "./pile-family.js";
import { sortedPlan, type Plan } from "./plan.js";
import type { Problem } from "./problem.js";
import { Remembered } from "./remembered.js";
import { nodeTables, siteModel, type NodeTables, type SiteModel } from "./site-model.js";
import { structureTables } from "./structure-tables.js";

/** A problem with everything that does not depend on the count made ready. */
export interface PreparedSite {
  readonly problem: Problem;
  readonly model: SiteModel;
  /** positions of a count */
  holes(count: number): readonly Point[];
  /** what the holes of a count see of the ground under the piles, at the two nodes; undefined for no holes */
  layout(count: number): readonly [LayoutTables, LayoutTables] | undefined;
  /** law of the design values of a count */
  design(count: number): DesignLaw;
}

// Dear things first: a family holds finite-element solutions, tables depend on it and on scales, the rest is sums.
const families = new Remembered<PileFamily>(8);
const tables = new Remembered<NodeTables>(48);
const layouts = new Remembered<readonly [LayoutTables, LayoutTables]>(400);
const sums = new Remembered<ReadingSums>(400);
const sites = new Remembered<PreparedSite>(200);

/** Makes a problem ready; the same ground, piles or holes met before are not analysed again. */
export function preparedSite(problem: Problem): PreparedSite {
  const { ground, piles, building, investigation } = problem;
  const profile = groundProfile(ground);
  const familyKey = JSON.stringify([piles.diameter, piles.modulus, ground.poissonRatio, piles.shortest, piles.longest, profile.shapeKey]);
  const structureKey = JSON.stringify([ground.correlation, ground.horizontalScale, ground.verticalScale, profile.sdKey, investigation.readingSpacing, investigation.holeDepth]);
  const planKey = JSON.stringify(building.piles);
  const listed = investigation.holes === undefined ? [building.footprint] : investigation.holes;
  const siteKey = JSON.stringify([familyKey, piles.lengthRule, structureKey, planKey, listed, ground, investigation, building.footprint]);
  const known = sites.get(siteKey, () => prepare());
  return known.problem === problem ? known : { ...known, problem };

  function prepare(): PreparedSite {
    const depths = readingDepths(investigation.readingSpacing, investigation.holeDepth);
    requireDomain(depths.length > 0, "Reading spacing", `${investigation.readingSpacing} m`, "at most the hole depth");
    const family = families.get(familyKey, () =>
      pileFamily({
        diameter: piles.diameter, pileModulus: piles.modulus, poissonRatio: ground.poissonRatio,
        shortest: piles.shortest, longest: piles.longest, shape: profile.shape,
      }),
    );
    const plan = plans.get(planKey, () => sortedPlan(building.piles));
    const { j, fraction } = family.locate(profile.modulus);
    const terms = separableTerms(ground);
    const reach = reachOf(problem);
    const structure = { terms, relativeSd: profile.relativeSd, readingDepths: depths, reach };
    const tablesKey = `${familyKey}${structureKey}${planKey}${reach}`;
    const node = (at: number): NodeTables => tables.get(`${at}${tablesKey}`, () => nodeTables(structureTables(family, family.node(at), structure), plan, family));
    const nodes: [NodeTables, NodeTables] = [node(j), node(j - 1)];
    const model = siteModel(plan, family, nodes, fraction, {
      modulus: profile.modulus, groundVariance: profile.groundVariance, regionalVariance: profile.regionalVariance,
    });
    const correlation = fieldCorrelation(ground);
    const relativeSd = depths.map((z) => profile.relativeSd(z));
    const holes = (count: number): readonly Point[] => positions(problem, count);
    const holesKey = (count: number): string => `${structureKey}${JSON.stringify(holes(count))}`;
    const variances: LogVariances = {
      ground: profile.groundVariance,
      regional: profile.regionalVariance,
      reading: logarithmOfOnePlus(investigation.readingCov ** 2),
      hole: logarithmOfOnePlus(investigation.holeCov ** 2),
      method: logarithmOfOnePlus(investigation.methodCov ** 2),
    };
    const nearest = (places: readonly Point[]): DesignLaw => {
      const n = places.length;
      // A hole's own sums are the same wherever it stands.
      const alone = readingSums([places[0]], investigation.readingSpacing, relativeSd, correlation);
      const single = designDistribution(investigation.designRule, alone, profile.logModulus, variances);
      const between = new Float64Array(n * n);
      for (let a = 0; a < n; a++) {
        for (let b = 0; b < a; b++) {
          // Two holes' mean covariance out of the sums over both: the off-diagonal half of four equal quarters.
          const both = readingSums([places[a], places[b]], investigation.readingSpacing, relativeSd, correlation);
          const shared = 2 * both.meanCovariance - alone.meanCovariance;
          between[a * n + b] = between[b * n + a] = single.gain ** 2 * (variances.ground * shared + variances.regional + variances.method);
        }
      }
      const ofPile = Int32Array.from(building.piles, (p) => {
        const distances = places.map((h) => hypotenuse(h.x - p.x, h.y - p.y));
        return distances.indexOf(Math.min(...distances));
      });
      return nearestLaw(single, between, n, ofPile);
    };
    const readings = (count: number): ReadingSums | undefined =>
      count === 0 ? undefined : sums.get(holesKey(count), () => readingSums(holes(count), investigation.readingSpacing, relativeSd, correlation));
    return {
      problem, model, holes,
      layout: (count) =>
        count === 0
          ? undefined
          : layouts.get(`${j}${tablesKey}${holesKey(count)}`, () => {
              const at = (b: 0 | 1): LayoutTables => layoutTables(nodes[b].tables, plan, holes(count), family.lengths.length, family.formIndices.length);
              return [at(0), at(1)];
            }),
      design: (count) => {
        const rule = investigation.designRule;
        if (piles.lengthRule !== "nearest" || count < 2) return commonLaw(designDistribution(rule, readings(count), profile.logModulus, variances), building.piles.length);
        return nearest(holes(count));
      },
    };
  }
}

const plans = new Remembered<Plan>(40);
const automatic = new Remembered<readonly Point[]>(400);

/** Positions of a count's holes: the first rows of the list, or automatic. */
export function positions(problem: Problem, count: number): readonly Point[] {
  const { holes } = problem.investigation;
  if (holes !== undefined) {
    requireDomain(count <= holes.length, "Number of holes", count, `at most ${holes.length}, the length of the hole list`);
    return holes.slice(0, count);
  }
  const { footprint, piles } = problem.building;
  const middle = (values: number[]): number => (Math.min(...values) + Math.max(...values)) / 2;
  const centre = { x: metres(middle(piles.map((p) => p.x))), y: metres(middle(piles.map((p) => p.y))) };
  return automatic.get(JSON.stringify([centre, footprint, count]), () => automaticHoles({ centre, length: footprint.length, width: footprint.width }, count));
}

/** Greatest distance between any pile or hole, m; the same for all counts, so that tables are shared. */
function reachOf(problem: Problem): number {
  const { piles, footprint } = problem.building;
  const { holes } = problem.investigation;
  const xs = piles.map((p) => p.x as number);
  const ys = piles.map((p) => p.y as number);
  const centreX = (Math.min(...xs) + Math.max(...xs)) / 2;
  const centreY = (Math.min(...ys) + Math.max(...ys)) / 2;
  const places = holes ?? [
    { x: centreX - footprint.length / 2, y: centreY - footprint.width / 2 },
    { x: centreX + footprint.length / 2, y: centreY + footprint.width / 2 },
  ];
  xs.push(...places.map((p) => p.x));
  ys.push(...places.map((p) => p.y));
  return hypotenuse(Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys));
}
