/** Rings and levels of a mesh gathered into fewer cells, numbered ring group by ring group: cell = ringGroup * levelGroups + levelGroup. */
export interface CellGroups {
  /** ring group of each ring of the mesh */
  readonly ringGroups: Int32Array;
  /** level group of each level of the mesh */
  readonly levelGroups: Int32Array;
  /** representative radius of each ring group, m, increasing; the same for all lengths of one diameter */
  readonly radii: Float64Array;
  /** depths that bound the level groups, m, one more than there are groups */
  readonly levelBounds: Float64Array;
}

/** The second-order term Q = g' M g of ln stiffness, on grouped cells. */
export interface GroupedForm extends CellGroups {
  /** M, symmetric, cells x cells, row by row, dimensionless; for a field in units of its own standard deviation Q is multiplied by sigma^2 */
  readonly matrix: Float64Array;
  /** energy shares summed to the cells, dimensionless */
  readonly weights: Float64Array;
}
