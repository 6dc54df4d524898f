//! The tables of models, each made once and shared.

use super::pool::{Overloaded, Pool};
use super::store::{Store, Weighed};
use crate::expansion::{History, HistoryFault};
use crate::model::Spec;
use std::sync::Arc;

/// What is prepared, and the pool that prepares it.
pub struct Prepared {
    histories: Store<History>,
    pool: Pool,
}

/// How much may be kept and done at once.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Capacity {
    /// Memory for tables, in bytes.
    pub cache_bytes: u64,
    /// Threads that compute.
    pub workers: usize,
    /// Jobs that may wait for a thread.
    pub waiting: usize,
}

/// Why there are no tables.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum Unprepared {
    /// The model has no history that could be tabulated.
    #[error(transparent)]
    History(#[from] HistoryFault),
    /// The service has too much to do.
    #[error(transparent)]
    Overloaded(#[from] Overloaded),
}

impl Default for Capacity {
    fn default() -> Capacity {
        let workers = std::thread::available_parallelism().map_or(1, usize::from);
        Capacity {
            cache_bytes: 64 << 20,
            workers,
            waiting: 128,
        }
    }
}

impl Prepared {
    /// Nothing prepared yet.
    pub fn new(capacity: Capacity) -> Prepared {
        Prepared {
            histories: Store::new(capacity.cache_bytes),
            pool: Pool::new(capacity.workers, capacity.waiting),
        }
    }

    /// The tables of `spec`: kept ones, or new ones, made once however many wait for them.
    ///
    /// # Errors
    /// [`Unprepared`]; failures are not kept.
    pub async fn history(&self, spec: &Spec) -> Result<Arc<History>, Unprepared> {
        let key = spec.canonical_bytes();
        let build = async {
            let spec = spec.clone();
            Ok(self.pool.run(move || History::build(&spec)).await??)
        };
        self.histories
            .get(&key, build)
            .await
            .map_err(Arc::unwrap_or_clone)
    }

    /// Runs a long computation off the threads that talk to clients.
    ///
    /// # Errors
    /// [`Overloaded`] if too many wait already.
    pub async fn run<T, F>(&self, job: F) -> Result<T, Overloaded>
    where
        T: Send + 'static,
        F: FnOnce() -> T + Send + 'static,
    {
        self.pool.run(job).await
    }

    /// How many models are kept and what their tables weigh in bytes.
    pub async fn load(&self) -> (u64, u64) {
        self.histories.load().await
    }
}

impl Weighed for History {
    fn bytes(&self) -> usize {
        History::bytes(self)
    }
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;
    use crate::model::Declaration;

    fn spec(hubble_constant: f64) -> Spec {
        Declaration {
            hubble_constant,
            matter: 0.3,
            ..Declaration::default()
        }
        .close()
        .unwrap()
    }

    #[tokio::test(flavor = "multi_thread")]
    async fn the_same_model_is_the_same_tables() {
        let prepared = Prepared::new(Capacity::default());
        let (first, again) = (
            prepared.history(&spec(70.0)).await.unwrap(),
            prepared.history(&spec(70.0)).await.unwrap(),
        );
        assert!(Arc::ptr_eq(&first, &again));
        let other = prepared.history(&spec(71.0)).await.unwrap();
        assert!(!Arc::ptr_eq(&first, &other));
        let (models, bytes) = prepared.load().await;
        assert_eq!(models, 2);
        assert!(bytes as usize >= first.bytes() + other.bytes());
    }

    #[tokio::test(flavor = "multi_thread")]
    async fn a_full_pool_refuses_a_model_that_is_not_kept() {
        let capacity = Capacity {
            cache_bytes: 1 << 20,
            workers: 1,
            waiting: 0,
        };
        let prepared = Arc::new(Prepared::new(capacity));
        prepared.history(&spec(70.0)).await.unwrap();
        let (release, held) = std::sync::mpsc::channel::<()>();
        let busy = Arc::clone(&prepared);
        let (started, start) = tokio::sync::oneshot::channel();
        let work = tokio::spawn(async move {
            let job = move || {
                started.send(()).unwrap();
                held.recv().is_ok()
            };
            busy.run(job).await
        });
        start.await.unwrap();
        assert_eq!(
            prepared.history(&spec(71.0)).await.err(),
            Some(Unprepared::Overloaded(Overloaded))
        );
        assert!(prepared.history(&spec(70.0)).await.is_ok());
        release.send(()).unwrap();
        assert_eq!(work.await.unwrap(), Ok(true));
    }
}
