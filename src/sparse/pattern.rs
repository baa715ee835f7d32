//! Which entries of a square matrix can be other than zero.

/// The places of a square matrix that can be non-zero, row by row, columns
/// ascending. The diagonal always belongs to it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Pattern {
    rows: Vec<Vec<u32>>,
}

impl Pattern {
    /// Builds a pattern of `size` rows from (row, column) pairs in any order,
    /// repeats allowed; the diagonal is added.
    ///
    /// # Panics
    /// If a row or column is not below `size`.
    #[must_use]
    pub fn new(size: usize, places: impl IntoIterator<Item = (usize, usize)>) -> Self {
        let mut rows: Vec<Vec<u32>> = (0..size as u32).map(|i| vec![i]).collect();
        for (row, column) in places {
            assert!(column < size, "column {column} of a matrix of {size}");
            rows[row].push(column as u32);
        }
        for row in &mut rows {
            row.sort_unstable();
            row.dedup();
        }
        Self { rows }
    }

    /// Rows (and columns).
    #[must_use]
    pub fn size(&self) -> usize {
        self.rows.len()
    }

    /// The columns of one row, ascending.
    #[must_use]
    pub fn row(&self, row: usize) -> &[u32] {
        &self.rows[row]
    }

    /// Number of places.
    #[must_use]
    pub fn count(&self) -> usize {
        self.rows.iter().map(Vec::len).sum()
    }

    /// The pattern with rows and columns renumbered: `order[new] = old`.
    #[must_use]
    pub fn renumbered(&self, order: &[usize]) -> Self {
        let mut new_of = vec![0; order.len()];
        for (new, &old) in order.iter().enumerate() {
            new_of[old] = new;
        }
        let places = (0..self.size())
            .flat_map(|row| self.row(row).iter().map(move |&column| (row, column)))
            .map(|(row, column)| (new_of[row], new_of[column as usize]));
        Self::new(self.size(), places)
    }
}
