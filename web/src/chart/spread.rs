//! Labels along a line without one on top of another.

/// Centres for labels that want to stand at `wanted` (rising), each taking its size in `sizes`, inside
/// `low..high`: as near to where they want to be as the others allow (least squares, by pooling neighbours
/// that collide). When there is no room for all, they stand tightly from `low` on and run over `high`: thin
/// them first.
#[must_use]
pub fn spread(wanted: &[f64], sizes: &[f64], low: f64, high: f64) -> Vec<f64> {
    let mut offset = 0.0;
    let offsets: Vec<f64> = sizes
        .iter()
        .map(|size| {
            offset += size;
            offset - size / 2.0
        })
        .collect();
    let most = (high - offset).max(low);
    let starts = pooled(wanted.iter().zip(&offsets).map(|(w, o)| w - o));
    starts.into_iter().zip(&offsets).map(|(start, o)| start.clamp(low, most) + o).collect()
}

/// The nearest sequence that never falls.
fn pooled(values: impl Iterator<Item = f64>) -> Vec<f64> {
    let mut pools: Vec<(f64, usize)> = Vec::new();
    for value in values {
        pools.push((value, 1));
        while let [.., (a, n), (b, m)] = pools[..]
            && a > b
        {
            pools.truncate(pools.len() - 2);
            pools.push(((a * n as f64 + b * m as f64) / (n + m) as f64, n + m));
        }
    }
    pools.into_iter().flat_map(|(value, count)| std::iter::repeat_n(value, count)).collect()
}

/// Of `count` labels each taking `size`, every how many can be shown on `room`: 1 is all of them.
#[must_use]
pub fn every(count: usize, size: f64, room: f64) -> usize {
    let fit = (room / size).floor().max(1.0) as usize;
    count.div_ceil(fit).max(1)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn leave_alone_what_does_not_collide() {
        assert_eq!(spread(&[10.0, 40.0, 80.0], &[20.0; 3], 0.0, 100.0), [10.0, 40.0, 80.0]);
    }

    #[test]
    fn part_what_collides_and_stay_inside() {
        assert_eq!(spread(&[50.0, 52.0], &[20.0; 2], 0.0, 100.0), [41.0, 61.0]);
        assert_eq!(spread(&[0.0, 99.0, 100.0], &[20.0; 3], 0.0, 100.0), [10.0, 70.0, 90.0]);
    }

    #[test]
    fn keep_their_order_and_distance() {
        let wanted = [3.0, 3.0, 5.0, 40.0, 41.0, 95.0, 99.0];
        let got = spread(&wanted, &[12.0; 7], 0.0, 100.0);
        assert!(got.windows(2).all(|w| w[1] - w[0] > 12.0 - 1e-9), "{got:?}");
        assert!(got[0] >= 6.0 && got[6] <= 94.0);
    }

    #[test]
    fn are_thinned_by_the_room() {
        assert_eq!((every(11, 20.0, 440.0), every(30, 20.0, 440.0), every(60, 20.0, 440.0)), (1, 2, 3));
        assert_eq!(every(0, 20.0, 440.0), 1);
    }
}
