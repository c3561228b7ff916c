/**
 * A thin-walled section of one closed cell: straight walls along the middle line from point to point.
 * Bredt's shear flow, and the small share that each wall carries by itself as an open strip; without that
 * share the stress on the outside of a wall is missed by about t/b.
 * Sources: Bredt (1896), in Timoshenko & Goodier, Theory of Elasticity, 3rd ed., section 115;
 * EN 10210-2, Annex A, I_t and C_t, which is this for a rounded box of one thickness.
 */

/** A corner of the middle line, in m, and the thickness of the wall from it to the next, in m. */
export interface WallPoint {
  y: number
  z: number
  t: number
}

interface Wall {
  from: WallPoint
  to: WallPoint
  length: number
  t: number
}

const wallsOf = (points: readonly WallPoint[]): Wall[] =>
  points.map((from, i) => {
    const to = points[(i + 1) % points.length] ?? from
    return { from, to, length: Math.hypot(to.y - from.y, to.z - from.z), t: from.t }
  })

const sum = (walls: readonly Wall[], of: (wall: Wall) => number): number =>
  walls.reduce((total, wall) => total + of(wall), 0)

export interface ClosedCell {
  /** Area within the middle line, m². */
  enclosedArea: number
  perimeter: number
  /** ∮ ds/t, a bare number. */
  slenderness: number
  /** Σ l·t³/3, m⁴: what the walls carry as open strips. */
  openConstant: number
  torsionConstant: number
  torsionModulus: number
  /** Index of the wall with the greatest shear stress. */
  governingWall: number
  area: number
  /** Centroid, m, in the axes of the points. */
  centroid: { y: number; z: number }
  /** About axes through the centroid, m⁴. */
  I_y: number
  I_z: number
  I_yz: number
  /** Greatest distances of the outside from the centroid, m. */
  reach: { y: number; z: number }
  /** Greatest thickness over mean width 4·A_m/perimeter: small where thin-wall theory holds. */
  thickness: number
}

/**
 * @param points at least three corners of a middle line that does not cross itself, in either sense
 */
export const closedCell = (points: readonly WallPoint[]): ClosedCell => {
  const walls = wallsOf(points)
  const enclosedArea = Math.abs(sum(walls, ({ from, to }) => from.y * to.z - to.y * from.z)) / 2
  const perimeter = sum(walls, ({ length }) => length)
  const slenderness = sum(walls, ({ length, t }) => length / t)
  const openConstant = sum(walls, ({ length, t }) => (length * t ** 3) / 3)
  const torsionConstant = (4 * enclosedArea ** 2) / slenderness + openConstant
  // Shear stress on the outside of a wall for T/J = 1: Bredt's flow over t, and the strip's own t.
  const stresses = walls.map(({ t }) => (2 * enclosedArea) / (slenderness * t) + t)
  const greatest = Math.max(...stresses)

  const area = sum(walls, ({ length, t }) => length * t)
  const middle = (axis: 'y' | 'z') => (wall: Wall) => (wall.from[axis] + wall.to[axis]) / 2
  const centroid = {
    y: sum(walls, (wall) => wall.length * wall.t * middle('y')(wall)) / area,
    z: sum(walls, (wall) => wall.length * wall.t * middle('z')(wall)) / area,
  }
  // A straight wall about the centroid: its own second moment along and across, and Steiner's share.
  const moment = (p: 'y' | 'z', q: 'y' | 'z') =>
    sum(walls, (wall) => {
      const along = (axis: 'y' | 'z') => wall.to[axis] - wall.from[axis]
      const across = (axis: 'y' | 'z') => (axis === 'y' ? -along('z') : along('y')) * (wall.t / wall.length)
      const area = wall.length * wall.t
      const own = (area * (along(p) * along(q) + across(p) * across(q))) / 12
      return own + area * (middle(p)(wall) - centroid[p]) * (middle(q)(wall) - centroid[q])
    })
  const reach = (axis: 'y' | 'z') =>
    Math.max(
      ...walls.flatMap(({ from, to, t }) =>
        [from, to].map((end) => Math.abs(end[axis] - centroid[axis]) + t / 2),
      ),
    )

  return {
    enclosedArea,
    perimeter,
    slenderness,
    openConstant,
    torsionConstant,
    torsionModulus: torsionConstant / greatest,
    governingWall: stresses.indexOf(greatest),
    area,
    centroid,
    I_y: moment('z', 'z'),
    I_z: moment('y', 'y'),
    I_yz: moment('y', 'z'),
    reach: { y: reach('y'), z: reach('z') },
    thickness: Math.max(...walls.map(({ t }) => t)) / ((4 * enclosedArea) / perimeter),
  }
}

/** True where two walls that are not neighbours meet: then the points enclose no single cell. */
export const crossesItself = (points: readonly WallPoint[]): boolean => {
  const walls = wallsOf(points)
  const side = (a: WallPoint, b: WallPoint, c: WallPoint) =>
    (b.y - a.y) * (c.z - a.z) - (b.z - a.z) * (c.y - a.y)
  return walls.some((one, i) =>
    walls.some((other, j) => {
      const areNeighbours = Math.abs(i - j) <= 1 || Math.abs(i - j) === walls.length - 1
      if (j <= i || areNeighbours) return false
      const a = side(one.from, one.to, other.from) * side(one.from, one.to, other.to)
      const b = side(other.from, other.to, one.from) * side(other.from, other.to, one.to)
      return a <= 0 && b <= 0
    }),
  )
}
