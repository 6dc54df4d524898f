//! Processor time of threads, as the kernel counts it: what a busy machine does to a wall clock it does not do to this.

use std::fs;
use std::sync::mpsc::{Receiver, Sender, channel};
use std::thread;
use std::time::Duration;

/// Nanoseconds that all threads of this process but the caller's have run, once they wait for work.
pub(crate) fn others_ns() -> u64 {
    let own = thread_id();
    settled(|| {
        let tasks = fs::read_dir("/proc/self/task").expect("Linux counts the time of threads");
        tasks
            .filter_map(|task| task.ok()?.file_name().into_string().ok())
            .filter(|task| *task != own)
            .filter_map(|task| run_time_ns(&task))
            .sum()
    })
}

/// A thread that runs jobs one by one, so that its time can be read while it waits.
pub(crate) struct Worker {
    jobs: Sender<Box<dyn FnOnce() + Send>>,
    done: Receiver<()>,
    task: String,
}

impl Worker {
    /// Starts the thread.
    pub(crate) fn new() -> Worker {
        let (jobs, received) = channel::<Box<dyn FnOnce() + Send>>();
        let (finished, done) = channel();
        let (tell, told) = channel();
        thread::spawn(move || {
            tell.send(thread_id()).expect("the starter waits for it");
            for job in received {
                job();
                // Fails only when nobody measures any more.
                let _ = finished.send(());
            }
        });
        Worker {
            jobs,
            done,
            task: told.recv().expect("the thread starts"),
        }
    }

    /// Nanoseconds that `job` takes on the thread.
    pub(crate) fn time_ns(&self, job: impl FnOnce() + Send + 'static) -> u64 {
        let before = self.settled_ns();
        self.jobs
            .send(Box::new(job))
            .expect("the thread waits for jobs");
        self.done.recv().expect("the job ends");
        self.settled_ns() - before
    }

    fn settled_ns(&self) -> u64 {
        settled(|| run_time_ns(&self.task).expect("the thread is alive"))
    }
}

/// The count once it stands still: that of a thread which runs is a little behind.
fn settled(count: impl Fn() -> u64) -> u64 {
    let mut last = count();
    loop {
        thread::sleep(Duration::from_micros(200));
        let now = count();
        if now == last {
            return now;
        }
        last = now;
    }
}

fn run_time_ns(task: &str) -> Option<u64> {
    let text = fs::read_to_string(format!("/proc/self/task/{task}/schedstat")).ok()?;
    text.split_whitespace().next()?.parse().ok()
}

fn thread_id() -> String {
    let link = fs::read_link("/proc/thread-self").expect("Linux names threads");
    link.file_name()
        .expect("the link ends with the thread")
        .to_string_lossy()
        .into_owned()
}
