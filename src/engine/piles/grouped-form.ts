/**
 * The second-order term Q = g' M g of ln stiffness, on cells grouped from the rings and levels of the mesh.
 * Cells are numbered ring group by ring group: cell = ringGroup * levelGroupCount + levelGroup.
 */
export interface GroupedForm {
  /** ring group of each ring of the response, one entry a ring */
  readonly ringGroups: Int32Array;
  /** level group of each level of the response, one entry a level */
  readonly levelGroups: Int32Array;
  /** representative radius of each ring group, m, increasing */
  readonly radii: Float64Array;
  /** depths that bound the level groups, m, one more than there are groups */
  readonly levelBounds: Float64Array;
  /** M, symmetric, cells x cells, row by row, dimensionless; for a field in units of its own standard deviation Q is multiplied by sigma^2 */
  readonly matrix: Float64Array;
  /** energy shares summed to the cells, dimensionless */
  readonly weights: Float64Array;
}
