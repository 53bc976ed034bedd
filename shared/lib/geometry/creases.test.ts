import { expect, test } from 'vitest'
import { box, icosphere, prism } from '../../../fixtures/reference/solids'
import { creaseNormals } from './creaseNormals'
import { featureEdges } from './featureEdges'

test('a box has twelve sharp edges, not its diagonals', () => {
  expect(featureEdges(box(1, 2, 3), 32).length / 2).toBe(12)
})

test('a prism of many sides is round about and sharp at its ends', () => {
  expect(featureEdges(prism(48, 5, 9), 32).length / 2).toBe(96)
  expect(featureEdges(prism(6, 5, 9), 32).length / 2).toBe(18)
})

test('a surface that ends has lines along its border', () => {
  const { positions, faces } = box(1, 1, 1)
  expect(featureEdges({ positions, faces: faces.slice(0, 6) }, 32).length / 2).toBe(4)
})

test('normals of a box stay those of its faces', () => {
  const normals = creaseNormals(box(2, 2, 2), 32)
  for (let corner = 0; corner < normals.length; corner += 3) {
    const sizes = [...normals.slice(corner, corner + 3)].map(Math.abs).sort()
    expect(sizes).toEqual([0, 0, 1])
  }
})

// Tolerance: the mean of five or six facets about a corner lies within a degree of the radius at 1,280 triangles.
test('normals of a ball look away from its middle', () => {
  const ball = icosphere(3, 3)
  const normals = creaseNormals(ball, 32)
  ball.faces.forEach((vertex, corner) => {
    let along = 0
    for (let axis = 0; axis < 3; axis++)
      along += (normals[corner * 3 + axis]! * ball.positions[vertex * 3 + axis]!) / 3
    expect(along).toBeGreaterThan(Math.cos((1 * Math.PI) / 180))
  })
})
