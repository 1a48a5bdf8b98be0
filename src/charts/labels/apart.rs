//! Labels along an edge, moved apart where they would touch.
//!
//! Knows nothing of which edge.

/// Positions in the order given, each at least `room` behind the one before and all between `low` and `high`, as near
/// to the wished ones as one push to and fro leaves them. What is too many for the edge is drawn together evenly.
pub fn apart(wished: &[f64], room: f64, (low, high): (f64, f64)) -> Vec<f64> {
    let gaps = wished.len().saturating_sub(1).max(1) as f64;
    let room = room.min((high - low) / gaps);
    let mut apart = wished.to_vec();
    // half of a crowd's need is pushed back, so that it stays about its middle
    for crowd in crowds(wished, room) {
        let members = &mut apart[crowd.clone()];
        let middle = members.iter().sum::<f64>() / members.len() as f64;
        let first = middle - room * (members.len() - 1) as f64 / 2.0;
        for (i, x) in members.iter_mut().enumerate() {
            *x = first + room * i as f64;
        }
    }
    let mut floor = low;
    for x in &mut apart {
        *x = x.max(floor);
        floor = *x + room;
    }
    let mut ceiling = high;
    for x in apart.iter_mut().rev() {
        *x = x.min(ceiling);
        ceiling = *x - room;
    }
    apart
}

/// Runs of neighbours that stand nearer to each other than `room`.
fn crowds(wished: &[f64], room: f64) -> Vec<std::ops::Range<usize>> {
    let mut crowds = Vec::new();
    let mut begin = 0;
    for end in 1..=wished.len() {
        if end == wished.len() || wished[end] - wished[end - 1] >= room {
            crowds.push(begin..end);
            begin = end;
        }
    }
    crowds
}

#[cfg(test)]
mod tests {
    use super::apart;

    #[test]
    fn what_has_room_stays_and_a_crowd_spreads_about_its_middle() {
        assert_eq!(apart(&[10.0, 50.0, 90.0], 20.0, (0.0, 100.0)), [10.0, 50.0, 90.0]);
        assert_eq!(apart(&[49.0, 51.0], 20.0, (0.0, 100.0)), [40.0, 60.0]);
        assert_eq!(apart(&[1.0, 2.0], 20.0, (0.0, 100.0)), [0.0, 20.0]);
        assert!(apart(&[], 20.0, (0.0, 100.0)).is_empty());
    }
}
