//! The schemas of conversions: what follows from the catalogue, and the answer.

use super::super::model::schema::ModelAnswer;
use super::super::schema::{closed_object, one_of, reference, words};
use super::super::service::Service;
use super::answer::Accuracy;
use super::request::{LONGEST_SOUND_HORIZON_MPC, OutputRequest};
use crate::jobs::Code;
use crate::quantity::{QUANTITIES, Quantity};
use std::borrow::Cow;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{ArrayBuilder, Object, ObjectBuilder, Schema, SchemaType, Type};
use utoipa::{PartialSchema, ToSchema};

/// Gives a marker the schema that `$schema` makes, and those that it refers to.
macro_rules! schemas {
    ($($(#[$doc:meta])* $name:ident => $schema:expr, [$($inner:ty),*];)*) => {$(
        $(#[$doc])*
        #[derive(Debug)]
        pub struct $name;

        impl PartialSchema for $name {
            fn schema() -> RefOr<Schema> {
                $schema.into()
            }
        }

        impl ToSchema for $name {
            fn name() -> Cow<'static, str> {
                stringify!($name).into()
            }

            fn schemas(_schemas: &mut Vec<(String, RefOr<Schema>)>) {
                $(
                    _schemas.push((<$inner>::name().into_owned(), <$inner>::schema()));
                    <$inner>::schemas(_schemas);
                )*
            }
        }
    )*};
}

schemas! {
    /// Any quantity.
    QuantityName => words(names(|_| true), "A quantity; GET /v1/quantities tells what each is."), [];
    /// A quantity that a redshift follows from.
    InvertibleQuantityName => words(names(|quantity| quantity.inverse.is_some()), "A quantity that a redshift follows from."), [];
    /// A quantity by name or with options.
    Output => one_of(
        [reference("QuantityName"), reference("OutputRequest")],
        "A quantity by its name, or with options.",
    ), [QuantityName, OutputRequest];
    /// One value or many.
    Values => one_of([number().into(), values().into()], "One value or an array; null gives null with the remark `missing`."), [];
    /// A branch by word or number.
    Branch => one_of(
        [
            words(["near", "far", "all"], "The lowest redshift, the highest, or every one.").into(),
            ObjectBuilder::new().schema_type(Type::Integer).minimum(Some(1)).maximum(Some(1000))
                .description(Some("Counted from 1 at the lowest redshift.")).into(),
        ],
        "Which redshift is meant where several give one value.",
    ), [];
    /// A length or the model's own.
    PerSoundHorizon => one_of(
        [
            ObjectBuilder::new().schema_type(Type::Boolean).into(),
            ObjectBuilder::new().schema_type(Type::Number).exclusive_minimum(Some(0.0))
                .maximum(Some(LONGEST_SOUND_HORIZON_MPC)).into(),
        ],
        "True for the model's own sound horizon at its drag redshift, or a length in Mpc.",
    ), [];
    /// One optional member a quantity.
    Columns => by_quantity("The columns by quantity: one member for each output.", "Column"), [Column];
    /// One optional member a quantity.
    Accuracies => by_quantity("Accuracies by quantity: one member for each that the model defines.", "Accuracy"), [Accuracy];
}

fn names(wanted: impl Fn(&Quantity) -> bool) -> Vec<&'static str> {
    QUANTITIES
        .iter()
        .filter(|quantity| wanted(quantity))
        .map(|quantity| quantity.name)
        .collect()
}

fn number() -> ObjectBuilder {
    ObjectBuilder::new().schema_type(Type::Number)
}

fn values() -> ArrayBuilder {
    let item = ObjectBuilder::new().schema_type(SchemaType::from_iter([Type::Number, Type::Null]));
    ArrayBuilder::new().items(item).max_items(Some(1_000_000))
}

fn by_quantity(description: &str, member: &str) -> ObjectBuilder {
    let object = closed_object(description);
    QUANTITIES.iter().fold(object, |object, quantity| {
        object.property(quantity.name, reference(member))
    })
}

/// The answer of a conversion: columns with a row for each given value.
#[derive(Debug, ToSchema)]
pub struct ConvertAnswer {
    /// The model in full, as it was closed.
    pub model: ModelAnswer,
    /// Which service answered.
    pub service: Service,
    /// What was given.
    pub from: FromAnswer,
    /// The stretches of redshift on which the given quantity is monotone; absent where there is only one.
    #[schema(nullable = false)]
    pub branches: Option<Vec<BranchRange>>,
    /// The columns.
    pub columns: Columns,
    /// What is said about rows, the first 1000 ordered by row.
    #[schema(max_items = 1000)]
    pub remarks: Vec<Remark>,
    /// How many rows have each code.
    pub remark_counts: Vec<RemarkCount>,
}

/// What was given.
#[derive(Debug, ToSchema)]
pub struct FromAnswer {
    /// The quantity.
    pub quantity: String,
    /// The unit of the given values.
    pub unit: String,
    /// Whether they were given per h.
    #[schema(nullable = false)]
    pub per_h: Option<bool>,
}

/// A stretch of redshift on which the given quantity is monotone.
#[derive(Debug, ToSchema)]
pub struct BranchRange {
    /// Counted from 1 at the lowest redshift.
    #[schema(minimum = 1)]
    pub branch: u32,
    /// Its ends, ascending.
    #[schema(min_items = 2, max_items = 2)]
    pub redshift: Vec<f64>,
}

/// A column of a quantity.
#[derive(Debug, ToSchema)]
pub struct Column {
    /// The unit, a VOUnits string; h is told by `per_h`.
    pub unit: String,
    /// Whether the values are multiplied by h to the power of the quantity.
    #[schema(nullable = false)]
    pub per_h: Option<bool>,
    /// The sound horizon in Mpc that the values are divided by.
    #[schema(nullable = false)]
    pub per_sound_horizon: Option<f64>,
    /// The numerical error of the values, for the numbers given and declared taken as exact, and a condition number up to 1. The condition number is the largest relative change of a value over that of a number it follows from; where it is larger the error grows with it, and from 1e-9/2^-52 on, some 4.5 million, the row says `ill_conditioned`. For a difference that passes through zero the figure holds as z → 0; elsewhere its error is told in units in the last place of its larger term: `ulps_of_larger_term` in GET /v1/quantities.
    pub accuracy: Accuracy,
    /// A number or null for each given value.
    pub values: Vec<Option<f64>>,
    /// The values on every branch, only with `"branch": "all"`; `values` is then branch 1.
    #[schema(nullable = false)]
    pub branches: Option<Vec<BranchColumn>>,
}

/// The values of a column on one branch.
#[derive(Debug, ToSchema)]
pub struct BranchColumn {
    /// Counted from 1 at the lowest redshift.
    #[schema(minimum = 1)]
    pub branch: u32,
    /// A number or null for each given value.
    pub values: Vec<Option<f64>>,
}

/// Something said about a row.
#[derive(Debug, ToSchema)]
pub struct Remark {
    /// The row, counted from 0.
    pub row: usize,
    /// The output it is about; absent for the whole row.
    #[schema(nullable = false)]
    pub column: Option<String>,
    /// What it says; the schema tells each code.
    #[schema(schema_with = remark_code)]
    pub code: String,
    /// What makes it exact.
    #[schema(nullable = false)]
    pub detail: Option<String>,
}

/// The codes that conversions say.
const SAID: [Code; 11] = [
    Code::Missing,
    Code::NotFinite,
    Code::Blueshift,
    Code::OutsideDomain,
    Code::BeyondMaximum,
    Code::BeforeBeginning,
    Code::NoBeginning,
    Code::BeyondModelRange,
    Code::BeyondPhysics,
    Code::Divergent,
    Code::IllConditioned,
];

/// A word, with what each means; no enumeration, since further ones may come.
fn remark_code() -> Object {
    let sentence = |code: &Code| {
        let end = if code.keeps_value() {
            ""
        } else {
            "; the value is null"
        };
        format!("- `{}`: {}{end}.", code.name(), code.meaning())
    };
    let sentences: Vec<_> = SAID.iter().map(sentence).collect();
    let description = format!(
        "What it says; further codes may come.\n\n{}",
        sentences.join("\n")
    );
    ObjectBuilder::new()
        .schema_type(Type::String)
        .description(Some(description))
        .examples(["missing"])
        .build()
}

/// How many rows have a code.
#[derive(Debug, ToSchema)]
pub struct RemarkCount {
    /// The code, as in a remark.
    pub code: String,
    /// The rows.
    pub rows: u64,
}
