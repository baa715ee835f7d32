//! The texts of a network folder, as whoever reads files hands them over.

use std::collections::BTreeMap;
use std::fmt;
use std::sync::Arc;

/// Finds the texts of another network by name, for `base`.
type Resolver = Arc<dyn Fn(&str) -> Option<NetworkTexts> + Send + Sync>;

/// The files of a network folder: `network.toml`, `species.csv`,
/// `reactions.csv` and `sources.csv`; others are ignored.
#[derive(Clone, Default)]
pub struct NetworkTexts {
    folder: String,
    files: BTreeMap<String, Vec<u8>>,
    resolver: Option<Resolver>,
}

impl NetworkTexts {
    /// An empty folder; `folder` is put before file names in findings and may
    /// be empty.
    pub fn new(folder: impl Into<String>) -> Self {
        Self { folder: folder.into(), ..Self::default() }
    }

    /// The same folder with one more file (or another content of that file).
    #[must_use]
    pub fn with(mut self, file: &str, content: impl Into<Vec<u8>>) -> Self {
        self.files.insert(file.to_string(), content.into());
        self
    }

    /// The same folder with a way to find the network named by `base`. Where it
    /// finds none, or there is no way given, shipped networks are looked at.
    #[must_use]
    pub fn with_resolver(
        mut self,
        resolver: impl Fn(&str) -> Option<NetworkTexts> + Send + Sync + 'static,
    ) -> Self {
        self.resolver = Some(Arc::new(resolver));
        self
    }

    /// Names and contents of the files, sorted by name.
    pub fn files(&self) -> impl Iterator<Item = (&str, &[u8])> {
        self.files.iter().map(|(name, content)| (name.as_str(), content.as_slice()))
    }

    /// The content of a file.
    pub fn get(&self, file: &str) -> Option<&[u8]> {
        self.files.get(file).map(Vec::as_slice)
    }

    /// The name by which findings call a file of this folder.
    pub(crate) fn label(&self, file: &str) -> String {
        if self.folder.is_empty() {
            file.to_string()
        } else {
            format!("{}/{file}", self.folder.trim_end_matches('/'))
        }
    }

    /// The texts of a base network, which inherit the way to find others.
    pub(crate) fn resolve(&self, name: &str) -> Option<NetworkTexts> {
        let found = self.resolver.as_ref().and_then(|resolver| resolver(name));
        let mut texts = found.or_else(|| super::shipped::texts(name))?;
        if texts.resolver.is_none() {
            texts.resolver.clone_from(&self.resolver);
        }
        Some(texts)
    }
}

impl fmt::Debug for NetworkTexts {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.debug_struct("NetworkTexts")
            .field("folder", &self.folder)
            .field("files", &self.files.keys().collect::<Vec<_>>())
            .finish_non_exhaustive()
    }
}
