//! Comma-separated values: a header line, a line a row, all digits, empty cells for nulls.

use super::Table;
use super::digits::shortest;

/// The file in chunks of about 64 KiB; its last column is `remark`.
pub fn chunks(table: Table) -> impl Iterator<Item = Vec<u8>> + Send + 'static {
    let mut row = 0;
    let mut head = Some(header(&table));
    std::iter::from_fn(move || {
        let mut out = head.take().unwrap_or_default();
        while out.len() < CHUNK_BYTES && row < table.rows {
            line(&table, row, &mut out);
            row += 1;
        }
        (!out.is_empty()).then_some(out)
    })
}

/// How much is written at once.
const CHUNK_BYTES: usize = 64 * 1024;

fn header(table: &Table) -> Vec<u8> {
    let names = table.columns.iter().map(|column| column.name.as_str());
    let names: Vec<_> = names.chain(["remark"]).collect();
    (names.join(",") + "\n").into_bytes()
}

fn line(table: &Table, row: usize, out: &mut Vec<u8>) {
    for column in &table.columns {
        match column.values.get(row) {
            Some(value) if value.is_finite() => shortest(out, *value),
            _ => {}
        }
        out.push(b',');
    }
    for (number, code) in table.remarks.row_codes(row).enumerate() {
        if number > 0 {
            out.push(b' ');
        }
        out.extend_from_slice(code.name().as_bytes());
    }
    out.push(b'\n');
}
