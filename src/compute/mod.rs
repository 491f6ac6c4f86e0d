//! The threads that assessments run on, their queues and budgets.
