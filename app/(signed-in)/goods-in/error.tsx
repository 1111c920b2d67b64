"use client";

export { FaultPage as default } from "@/components/ui/fault-page";
