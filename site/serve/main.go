// Command serve shows the built site on this machine, for development and for tests.
//
//	go run ./site/serve [-dir site/dist] [-addr 127.0.0.1:8137] [-prefix /some/sub/path/] [-csp=false] [-open]
//
// It prints the address on one line. Records belong to an address in the browser, so it prefers the same port each
// time; when that is taken it uses a free one and says so. Port 0 asks for a free one at once.
package main

import (
	"context"
	"errors"
	"flag"
	"fmt"
	"net"
	"net/http"
	"os"
	"os/exec"
	"os/signal"
	"runtime"
	"strings"
	"syscall"
)

const usualAddress = "127.0.0.1:8137"

func main() {
	dir := flag.String("dir", "site/dist", "directory to serve")
	addr := flag.String("addr", usualAddress, "address to listen on; port 0 takes a free one")
	prefix := flag.String("prefix", "/", "path under which the site appears")
	csp := flag.Bool("csp", true, "send the content security policy as a header too")
	open := flag.Bool("open", false, "open a browser where there is a display")
	flag.Parse()
	if err := serve(*dir, *addr, *prefix, *csp, *open); err != nil {
		fmt.Fprintln(os.Stderr, "serve:", err)
		os.Exit(1)
	}
}

func serve(dir, addr, prefix string, csp, open bool) error {
	if _, err := os.Stat(dir); err != nil {
		return fmt.Errorf("%w: build the site first", err)
	}
	listener, err := net.Listen("tcp", addr)
	if errors.Is(err, syscall.EADDRINUSE) && addr == usualAddress {
		fmt.Fprintf(os.Stderr, "%s is taken, so another port is used; records kept under that address are not seen under this one\n", addr)
		listener, err = net.Listen("tcp", "127.0.0.1:0")
	}
	if err != nil {
		return err
	}
	prefix = "/" + strings.Trim(prefix, "/") + "/"
	if prefix == "//" {
		prefix = "/"
	}
	address := "http://" + listener.Addr().String() + prefix
	fmt.Println(address)
	if open {
		openBrowser(address)
	}
	server := &http.Server{Handler: siteHandler(os.DirFS(dir), prefix, csp)}
	stop, cancel := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer cancel()
	go func() {
		<-stop.Done()
		_ = server.Close()
	}()
	if err := server.Serve(listener); !errors.Is(err, http.ErrServerClosed) {
		return err
	}
	return nil
}

// openBrowser opens the address where there is a display. That it cannot is no fault: the address is on the screen.
func openBrowser(address string) {
	var cmd *exec.Cmd
	switch {
	case runtime.GOOS == "darwin":
		cmd = exec.Command("open", address)
	case runtime.GOOS == "windows":
		cmd = exec.Command("rundll32", "url.dll,FileProtocolHandler", address)
	case os.Getenv("DISPLAY") != "" || os.Getenv("WAYLAND_DISPLAY") != "":
		cmd = exec.Command("xdg-open", address)
	default:
		return
	}
	if err := cmd.Start(); err == nil {
		go func() { _ = cmd.Wait() }()
	}
}
