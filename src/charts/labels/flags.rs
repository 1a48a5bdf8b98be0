//! Labels for instants along the top of a chart: flags in rows, each at the top of an upright line.
//!
//! Knows nothing of text: a flag is as wide as it is said to be.

/// An instant that wants a flag.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Mast {
    /// Where its line stands.
    pub x: f64,
    /// How wide its flag is.
    pub width: f64,
}

/// Where a flag hangs.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Flag {
    /// Its row, counted upwards from the chart.
    pub row: usize,
    /// Where it begins.
    pub left: f64,
    /// Where it ends.
    pub right: f64,
    /// Where the line stands that leads up to it.
    pub x: f64,
}

/// From a line to its flag, and from a flag to what follows.
const GAP: f64 = 5.0;

impl Flag {
    fn is_clear_of(&self, other: &Self) -> bool {
        let stands_in = |x: f64, flag: &Self| x > flag.left - GAP && x < flag.right + GAP;
        match self.row.cmp(&other.row) {
            std::cmp::Ordering::Equal => {
                (self.right + GAP <= other.left || other.right + GAP <= self.left)
                    && !stands_in(self.x, other)
                    && !stands_in(other.x, self)
            }
            // the line to the higher flag passes the lower row
            std::cmp::Ordering::Less => !stands_in(other.x, self),
            std::cmp::Ordering::Greater => !stands_in(self.x, other),
        }
    }
}

/// Hangs flags in at most `rows` rows between `left` and `right`; `None` where there is no room. Those first in the
/// slice are served first; served from the right to the left they climb over each other.
///
/// No two flags overlap, and no line passes through a flag.
pub fn flags(masts: &[Mast], rows: usize, (left, right): (f64, f64)) -> Vec<Option<Flag>> {
    let mut hung: Vec<Flag> = Vec::new();
    let mut answer = Vec::with_capacity(masts.len());
    for mast in masts {
        let x = mast.x;
        let behind = (0..rows).map(|row| Flag { row, left: x + GAP, right: x + GAP + mast.width, x });
        let before = (0..rows).map(|row| Flag { row, left: x - GAP - mast.width, right: x - GAP, x });
        let free = |flag: &Flag| {
            flag.left >= left && flag.right <= right && hung.iter().all(|other| flag.is_clear_of(other))
        };
        let flag = behind.chain(before).find(free);
        hung.extend(flag);
        answer.push(flag);
    }
    answer
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn flags_served_from_the_right_climb_over_each_other() {
        let masts: Vec<Mast> = [90.0, 60.0, 30.0].map(|x| Mast { x, width: 50.0 }).to_vec();
        let rows: Vec<usize> = flags(&masts, 3, (0.0, 200.0)).iter().map(|f| f.unwrap().row).collect();
        assert_eq!(rows, [0, 1, 2]);
    }

    #[test]
    fn at_the_right_edge_a_flag_hangs_to_the_left() {
        let flag = flags(&[Mast { x: 190.0, width: 50.0 }], 1, (0.0, 200.0))[0].unwrap();
        assert_eq!((flag.left, flag.right), (135.0, 185.0));
    }
}
