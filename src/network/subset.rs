//! Parts of a network.

use super::{Network, Reaction};

impl Network {
    /// The part of a network that has only these species and reactions, given
    /// by index. Species keep their order; a reaction stays only when all its
    /// species do; sources stay when something cites them. Indices beyond the
    /// network are ignored.
    #[must_use]
    pub fn subset(&self, keep_species: &[usize], keep_reactions: &[usize]) -> Self {
        let mut new_index: Vec<Option<usize>> = vec![None; self.species.len()];
        for index in keep_species {
            if let Some(slot) = new_index.get_mut(*index) {
                *slot = Some(0);
            }
        }
        let mut species = Vec::new();
        for (slot, one) in new_index.iter_mut().zip(&self.species) {
            if slot.is_some() {
                *slot = Some(species.len());
                species.push(one.clone());
            }
        }
        let renumber = |list: &[usize]| -> Option<Vec<usize>> {
            list.iter().map(|index| new_index[*index]).collect()
        };
        let mut wanted = vec![false; self.reactions.len()];
        for index in keep_reactions {
            if let Some(slot) = wanted.get_mut(*index) {
                *slot = true;
            }
        }
        let reactions: Vec<Reaction> = self
            .reactions
            .iter()
            .zip(wanted)
            .filter(|(_, wanted)| *wanted)
            .filter_map(|(reaction, _)| {
                Some(Reaction {
                    reactants: renumber(&reaction.reactants)?,
                    products: renumber(&reaction.products)?,
                    depends_on: renumber(&reaction.depends_on)?,
                    ..reaction.clone()
                })
            })
            .collect();
        let cited = |key: &str| {
            species.iter().any(|one| one.source == key)
                || reactions.iter().any(|r| r.rows.iter().any(|row| row.source == key))
        };
        let sources = self.sources.iter().filter(|source| cited(&source.key)).cloned().collect();
        Self { species, reactions, sources, ..self.head_only() }
    }

    /// Name and words without contents.
    fn head_only(&self) -> Self {
        Self {
            name: self.name.clone(),
            title: self.title.clone(),
            text: self.text.clone(),
            purpose: self.purpose.clone(),
            species: Vec::new(),
            reactions: Vec::new(),
            sources: Vec::new(),
        }
    }
}
