//! The JSON forms that clients read and write.
