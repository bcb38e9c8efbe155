//! The closed surface as a binary STL, in millimetres.

use stl_io::{Normal, Triangle, Vertex};

use crate::bench::solid::Solid;

/// The surface as a binary STL.
///
/// # Errors
/// Never for a surface in memory; the writer's own error is passed on.
pub fn stl(solid: &Solid) -> std::io::Result<Vec<u8>> {
    let corner = |i: u32| solid.vertices[i as usize].map(|v| 1e3 * v);
    let triangles: Vec<Triangle> = solid
        .triangles
        .iter()
        .map(|t| {
            let [a, b, c] = t.map(corner);
            let single = |v: [f64; 3]| v.map(|v| v as f32);
            Triangle {
                normal: Normal::new(single(normal(a, b, c))),
                vertices: [a, b, c].map(|v| Vertex::new(single(v))),
            }
        })
        .collect();
    let mut bytes = Vec::with_capacity(84 + 50 * triangles.len());
    stl_io::write_stl(&mut bytes, triangles.iter())?;
    Ok(bytes)
}

/// Unit normal, outward by the right hand; zero for a triangle without area.
fn normal(a: [f64; 3], b: [f64; 3], c: [f64; 3]) -> [f64; 3] {
    let d = |p: [f64; 3]| [p[0] - a[0], p[1] - a[1], p[2] - a[2]];
    let (u, v) = (d(b), d(c));
    let n = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
    let long = n.iter().map(|x| x * x).sum::<f64>().sqrt();
    if long > 0.0 { n.map(|x| x / long) } else { [0.0; 3] }
}
