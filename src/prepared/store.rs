//! Prepared things by key: built once however many wait, kept by weight.

use moka::future::Cache;
use std::sync::Arc;

/// Something whose place in memory is known.
pub trait Weighed: Send + Sync + 'static {
    /// Its size in bytes, the heap included.
    fn bytes(&self) -> usize;
}

/// A bounded store of `V`, each under the full bytes of its key: two keys never share an entry.
pub struct Store<V> {
    kept: Cache<Vec<u8>, Arc<V>>,
}

impl<V: Weighed> Store<V> {
    /// A store that keeps at most `capacity_bytes` of values and keys; the least wanted go first.
    pub fn new(capacity_bytes: u64) -> Store<V> {
        let kept = Cache::builder()
            .max_capacity(capacity_bytes)
            .weigher(|key: &Vec<u8>, value: &Arc<V>| {
                let bytes = key
                    .len()
                    .saturating_add(value.bytes())
                    .saturating_add(ENTRY_OVERHEAD_BYTES);
                u32::try_from(bytes).unwrap_or(u32::MAX)
            })
            .build();
        Store { kept }
    }

    /// The value under `key`, built by `build` if it is not kept.
    ///
    /// # Errors
    /// What `build` answers, to everyone who waited for that build; it is not kept.
    pub async fn get<E>(
        &self,
        key: &[u8],
        build: impl Future<Output = Result<V, E>>,
    ) -> Result<Arc<V>, Arc<E>>
    where
        E: Send + Sync + 'static,
    {
        self.kept
            .try_get_with_by_ref(key, async { build.await.map(Arc::new) })
            .await
    }

    /// How many entries are kept and what they weigh in bytes, after settling what is pending.
    pub async fn load(&self) -> (u64, u64) {
        self.kept.run_pending_tasks().await;
        (self.kept.entry_count(), self.kept.weighted_size())
    }
}

/// About what the cache itself spends on an entry (the hash table, both queues), from memory of its layout.
const ENTRY_OVERHEAD_BYTES: usize = 256;

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;
    use std::sync::atomic::{AtomicUsize, Ordering};

    struct Block(usize);
    impl Weighed for Block {
        fn bytes(&self) -> usize {
            self.0
        }
    }

    #[tokio::test(flavor = "multi_thread")]
    async fn a_hundred_waiters_share_one_build() {
        let store = Arc::new(Store::new(1 << 20));
        let builds = Arc::new(AtomicUsize::new(0));
        let waiters: Vec<_> = (0..100)
            .map(|_| {
                let (store, builds) = (Arc::clone(&store), Arc::clone(&builds));
                tokio::spawn(async move {
                    let build = async {
                        builds.fetch_add(1, Ordering::SeqCst);
                        tokio::time::sleep(std::time::Duration::from_millis(30)).await;
                        Ok::<_, ()>(Block(7))
                    };
                    store.get(b"one", build).await.map(|block| block.0)
                })
            })
            .collect();
        for waiter in waiters {
            assert_eq!(waiter.await.unwrap(), Ok(7));
        }
        assert_eq!(builds.load(Ordering::SeqCst), 1);
    }

    #[tokio::test]
    async fn a_failure_reaches_its_waiters_and_is_not_kept() {
        let store = Store::<Block>::new(1 << 20);
        let failed = store.get(b"key", async { Err("no") }).await;
        assert_eq!(failed.err().as_deref(), Some(&"no"));
        let built = store.get(b"key", async { Ok::<_, &str>(Block(1)) }).await;
        assert_eq!(built.unwrap().0, 1);
        let kept = store.get(b"key", async { Err("not asked") }).await;
        assert_eq!(kept.unwrap().0, 1);
    }

    #[tokio::test]
    async fn entries_go_when_their_bytes_exceed_the_capacity() {
        let capacity = 100_000;
        let store = Store::new(capacity);
        for index in 0..100_u32 {
            let built = store
                .get(&index.to_be_bytes(), async { Ok::<_, ()>(Block(10_000)) })
                .await;
            assert_eq!(built.unwrap().0, 10_000);
        }
        let (entries, bytes) = store.load().await;
        assert!(bytes <= capacity, "{bytes}");
        assert!((1..=9).contains(&entries), "{entries}");
    }

    #[tokio::test]
    async fn a_value_larger_than_the_store_is_still_served() {
        let store = Store::new(10);
        let built = store
            .get(b"large", async { Ok::<_, ()>(Block(1 << 30)) })
            .await;
        assert_eq!(built.unwrap().0, 1 << 30);
        assert_eq!(store.load().await, (0, 0));
    }
}
