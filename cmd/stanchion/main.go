// Command stanchion sizes and checks the steel columns of a schedule.
package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"
)

func main() { os.Exit(runMain()) }

// runMain runs the command line of this process and returns its exit status.
func runMain() int {
	ctx, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	return execute(ctx, systemConsole(), os.Args[1:])
}
