//! Pure functions from prepared histories and columns to columns, one job a file.
