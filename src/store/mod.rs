//! All SQL. Rows and connections never leave this folder.
