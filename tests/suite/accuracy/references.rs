//! The files of `tests/references/values`, read.

use std::collections::BTreeMap;
use std::path::{Path, PathBuf};
use std::sync::OnceLock;

use redfathom::expansion::History;
use redfathom::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration, Spec};

/// One universe with its values.
pub(crate) struct Reference {
    /// The file's name for it.
    pub name: String,
    pub spec: Spec,
    pub history: History,
    /// The range its values cover.
    pub range: (f64, f64),
    /// Quantities without a column, and why.
    pub without: BTreeMap<String, String>,
    pub table: Table,
}

/// Values by redshift and name.
pub(crate) struct Table {
    pub names: Vec<String>,
    pub rows: Vec<(f64, Vec<Cell>)>,
}

/// One value.
#[derive(Clone)]
pub(crate) enum Cell {
    /// The decimal and its condition (at least 1).
    Value { text: String, condition: f64 },
    /// The quantity diverges here.
    Divergent,
    /// Not given for this redshift.
    Absent,
}

/// The universes valid over the whole range of redshifts.
pub(crate) fn whole() -> &'static [Reference] {
    static WHOLE: OnceLock<Vec<Reference>> = OnceLock::new();
    WHOLE.get_or_init(|| folder("whole"))
}

/// Those with a bounce or a turnaround.
pub(crate) fn limited() -> &'static [Reference] {
    static LIMITED: OnceLock<Vec<Reference>> = OnceLock::new();
    LIMITED.get_or_init(|| folder("limited"))
}

/// The quantities that need no universe.
pub(crate) fn redshift_alone() -> &'static Table {
    static ALONE: OnceLock<Table> = OnceLock::new();
    ALONE.get_or_init(|| Table::read(&text(&values().join("redshift-alone.tsv"))))
}

pub(super) fn values() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/references/values")
}

pub(super) fn text(path: &Path) -> String {
    std::fs::read_to_string(path).unwrap_or_else(|error| panic!("{}: {error}", path.display()))
}

fn folder(name: &str) -> Vec<Reference> {
    let entries = std::fs::read_dir(values().join(name)).unwrap();
    let mut paths: Vec<PathBuf> = entries.map(|entry| entry.unwrap().path()).collect();
    paths.sort();
    paths
        .iter()
        .map(|path| Reference::read(&text(path)))
        .collect()
}

impl Table {
    fn read(text: &str) -> Table {
        let mut lines = text
            .lines()
            .skip_while(|line| !line.starts_with("redshift\t"));
        let names = lines
            .next()
            .unwrap()
            .split('\t')
            .skip(1)
            .map(str::to_owned)
            .collect();
        let row = |line: &str| {
            let mut cells = line.split('\t');
            (
                cells.next().unwrap().parse().unwrap(),
                cells.map(Cell::read).collect(),
            )
        };
        Table {
            names,
            rows: lines.map(row).collect(),
        }
    }

    /// The place of a quantity among the columns.
    pub(crate) fn column(&self, name: &str) -> Option<usize> {
        self.names.iter().position(|known| known == name)
    }
}

impl Cell {
    fn read(text: &str) -> Cell {
        match text {
            "" => Cell::Absent,
            "-" => Cell::Divergent,
            _ => {
                let (value, condition) = text.split_once('~').unwrap_or((text, "1"));
                Cell::Value {
                    text: value.to_owned(),
                    condition: condition.parse().unwrap(),
                }
            }
        }
    }
}

impl Reference {
    fn read(text: &str) -> Reference {
        let declared = |key: &str| {
            let line = text
                .lines()
                .find_map(|line| line.strip_prefix(key)?.strip_prefix('\t'));
            line.map(str::to_owned)
        };
        let number = |key: &str| declared(key).map(|text| text.parse::<f64>().unwrap());
        let form = declared("dark_energy").unwrap();
        let declaration = Declaration {
            hubble_constant: number("hubble_constant").unwrap(),
            matter: number("matter").unwrap(),
            curvature: number("curvature"),
            baryons: None,
            radiation: number("cmb_temperature").map(|temperature| RadiationDeclaration {
                cmb_temperature: Some(temperature),
                effective_neutrino_number: number("effective_neutrino_number"),
                neutrino_masses: list(declared("neutrino_masses")),
            }),
            dark_energy: Some(DarkEnergyDeclaration {
                form,
                density: None,
                parameters: number("w")
                    .map(|w| ("w".to_owned(), w))
                    .into_iter()
                    .collect(),
            }),
        };
        let name = declared("name").unwrap();
        let spec = declaration
            .close()
            .unwrap_or_else(|faults| panic!("{name}: {faults:?}"));
        let history = History::build(&spec).unwrap_or_else(|fault| panic!("{name}: {fault}"));
        let range = list(declared("range"));
        let without = text
            .lines()
            .filter_map(|line| line.strip_prefix("without\t")?.split_once('\t'));
        Reference {
            name,
            spec,
            history,
            range: (range[0], range[1]),
            without: without
                .map(|(name, reason)| (name.to_owned(), reason.to_owned()))
                .collect(),
            table: Table::read(text),
        }
    }
}

fn list(text: Option<String>) -> Vec<f64> {
    let text = text.unwrap_or_default();
    text.split(',')
        .filter(|part| !part.is_empty())
        .map(|part| part.parse().unwrap())
        .collect()
}

/// The history of a declared model that is known to be sound.
pub(crate) fn history_of(declaration: &Declaration) -> History {
    let spec = declaration
        .close()
        .unwrap_or_else(|faults| panic!("{declaration:?}: {faults:?}"));
    History::build(&spec).unwrap_or_else(|fault| panic!("{declaration:?}: {fault}"))
}

/// Matter and, unless `lambda` is false, a cosmological constant that closes; no radiation.
pub(crate) fn matter_model(hubble_constant: f64, matter: f64, lambda: bool) -> Declaration {
    let empty = DarkEnergyDeclaration {
        form: "none".to_owned(),
        ..Default::default()
    };
    Declaration {
        hubble_constant,
        matter,
        dark_energy: (!lambda).then_some(empty),
        ..Default::default()
    }
}
