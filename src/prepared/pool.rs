//! The bounded pool for work that would hold up other requests.

use std::sync::Arc;
use tokio::sync::Semaphore;

/// Runs jobs on a fixed number of threads, with a bounded number waiting.
///
/// A job whose caller has gone away before its turn is never run.
#[derive(Debug)]
pub struct Pool {
    running: Arc<Semaphore>,
    admitted: Arc<Semaphore>,
}

/// More work is waiting than the service accepts.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
#[error("all workers are busy and the queue is full; try again in a second")]
pub struct Overloaded;

impl Pool {
    /// A pool of `workers` threads (at least one) with room for `waiting` jobs beside those that run.
    pub fn new(workers: usize, waiting: usize) -> Pool {
        let workers = workers.clamp(1, MAXIMUM);
        let admitted = workers.saturating_add(waiting).min(MAXIMUM);
        Pool {
            running: Arc::new(Semaphore::new(workers)),
            admitted: Arc::new(Semaphore::new(admitted)),
        }
    }

    /// Runs `job` when a worker is free.
    ///
    /// # Errors
    /// [`Overloaded`], at once, if the queue is full. A panic of the job goes on in the caller.
    pub async fn run<T, F>(&self, job: F) -> Result<T, Overloaded>
    where
        T: Send + 'static,
        F: FnOnce() -> T + Send + 'static,
    {
        let admission = Arc::clone(&self.admitted)
            .try_acquire_owned()
            .map_err(|_| Overloaded)?;
        let worker = Arc::clone(&self.running)
            .acquire_owned()
            .await
            .map_err(|_| Overloaded)?;
        // Both permits travel with the job: a caller that leaves does not free a busy worker.
        let work = tokio::task::spawn_blocking(move || {
            let _held = (admission, worker);
            job()
        });
        match work.await {
            Ok(value) => Ok(value),
            Err(failure) => match failure.try_into_panic() {
                Ok(panic) => std::panic::resume_unwind(panic),
                // Cancelled: the runtime is shutting down.
                Err(_) => Err(Overloaded),
            },
        }
    }
}

/// What a semaphore can count, and more than any machine runs.
const MAXIMUM: usize = 1 << 20;

#[cfg(test)]
#[allow(clippy::unwrap_used, clippy::panic)]
mod tests {
    use super::*;
    use std::sync::atomic::{AtomicUsize, Ordering};
    use std::time::Duration;

    #[tokio::test(flavor = "multi_thread")]
    async fn no_more_jobs_run_at_once_than_there_are_workers() {
        let pool = Arc::new(Pool::new(2, 100));
        let (now, most) = (Arc::new(AtomicUsize::new(0)), Arc::new(AtomicUsize::new(0)));
        let jobs: Vec<_> = (0..40)
            .map(|index| {
                let (pool, now, most) = (Arc::clone(&pool), Arc::clone(&now), Arc::clone(&most));
                tokio::spawn(async move {
                    pool.run(move || {
                        most.fetch_max(now.fetch_add(1, Ordering::SeqCst) + 1, Ordering::SeqCst);
                        std::thread::sleep(Duration::from_millis(1));
                        now.fetch_sub(1, Ordering::SeqCst);
                        index
                    })
                    .await
                })
            })
            .collect();
        for (index, job) in jobs.into_iter().enumerate() {
            assert_eq!(job.await.unwrap(), Ok(index));
        }
        assert!(most.load(Ordering::SeqCst) <= 2);
    }

    #[tokio::test]
    async fn a_full_queue_refuses_at_once_and_recovers() {
        let pool = Arc::new(Pool::new(1, 0));
        let (release, held) = std::sync::mpsc::channel::<()>();
        let busy = Arc::clone(&pool);
        let first = tokio::spawn(async move { busy.run(move || held.recv().is_ok()).await });
        while pool.admitted.available_permits() > 0 {
            tokio::task::yield_now().await;
        }
        assert_eq!(pool.run(|| 1).await, Err(Overloaded));
        release.send(()).unwrap();
        assert_eq!(first.await.unwrap(), Ok(true));
        assert_eq!(pool.run(|| 2).await, Ok(2));
    }

    #[tokio::test]
    async fn a_panicking_job_frees_its_worker() {
        let pool = Arc::new(Pool::new(1, 0));
        let broken = Arc::clone(&pool);
        let outcome =
            tokio::spawn(async move { broken.run(|| -> u8 { panic!("on purpose") }).await }).await;
        assert!(outcome.is_err_and(|failure| failure.is_panic()));
        assert_eq!(pool.run(|| 3).await, Ok(3));
    }
}
