import { useThree } from '@react-three/fiber'
import { useMemo } from 'react'
import { BackSide, Color, ShaderMaterial, Vector2, type BufferGeometry } from 'three'

const WIDTH_PX = 1.6

/**
 * The outline of the solid: its far side pushed outwards by a pixel or two, so that it shows as a line about the near side.
 * The step is made on the screen and keeps its width at every zoom.
 */
export function Outline({ geometry, color }: { geometry: BufferGeometry; color: string }) {
  const size = useThree((state) => state.size)
  const material = useMemo(
    () =>
      new ShaderMaterial({
        side: BackSide,
        uniforms: {
          ink: { value: new Color(color) },
          pixel: { value: new Vector2((2 * WIDTH_PX) / size.width, (2 * WIDTH_PX) / size.height) },
        },
        vertexShader: `
          uniform vec2 pixel;
          void main() {
            vec4 place = projectionMatrix * modelViewMatrix * vec4(position, 1.0);
            vec2 away = (normalMatrix * normal).xy;
            float far = length(away);
            if (far > 1e-5) place.xy += away / far * pixel * place.w;
            gl_Position = place;
          }`,
        fragmentShader: `
          uniform vec3 ink;
          void main() {
            gl_FragColor = vec4(ink, 1.0);
            #include <colorspace_fragment>
          }`,
      }),
    [color, size.width, size.height],
  )
  return <mesh geometry={geometry} material={material} />
}
